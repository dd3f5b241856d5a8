import {
  Column,
  CreateDateColumn,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import { Group } from './group.entity'

/** A polymer by its repeat unit. */
@Entity('polymer')
@Unique('UQ_polymer_name', ['groupId', 'name'])
@Unique('UQ_polymer_group', ['groupId', 'id'])
export class Polymer {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_polymer' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('text')
  name!: string

  /** With exactly two `*`; fixed once a mapping stands on it, since beads count its atoms. */
  @Column('text')
  smiles!: string

  @Column('text')
  notes!: string

  /** Hill order, per repeat unit. */
  @Column('text')
  formula!: string

  /** g/mol per repeat unit. */
  @Column('double precision')
  mass!: number

  @Column('integer', { name: 'heavy_atoms' })
  heavyAtoms!: number

  @Column('integer')
  revision!: number

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @ManyToOne(() => Group, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'group_id', foreignKeyConstraintName: 'FK_polymer_group' })
  group?: Group
}

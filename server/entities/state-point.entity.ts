import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import { Polymer } from './polymer.entity'

/** Where a distribution was measured. */
@Entity('state_point')
@Unique('UQ_state_point_group', ['groupId', 'id'])
@Index('IX_state_point_polymer', ['polymerId'])
@Check('CK_state_point_temperature', '"temperature" > 0')
export class StatePoint {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_state_point' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'polymer_id' })
  polymerId!: string

  /** K; fixed once data stand on it. */
  @Column('double precision')
  temperature!: number

  /** bar */
  @Column('double precision', { nullable: true })
  pressure!: number | null

  @Column('text')
  phase!: string

  @Column('text')
  composition!: string

  @Column('text')
  notes!: string

  @Column('integer')
  revision!: number

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @ManyToOne(() => Polymer, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_state_point_polymer' },
    { name: 'polymer_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_state_point_polymer' },
  ])
  polymer?: Polymer
}

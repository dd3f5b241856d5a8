import {
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import type { Place } from '../../shared/contracts/mapping'
import { Mapping } from './mapping.entity'

/** A bond, angle or dihedral of a mapping. Its id survives edits of the mapping, so that data stay with it. */
@Entity('term')
@Unique('UQ_term_group', ['groupId', 'id'])
@Index('UQ_term_sequence', ['mappingId', 'kind', 'types', 'placeKey'], { unique: true, where: '"current"' })
@Index('IX_term_mapping', ['mappingId'])
export class Term {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_term' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'mapping_id' })
  mappingId!: string

  @Column('enum', { enum: ['bond', 'angle', 'dihedral'], enumName: 'coordinate_kind' })
  kind!: 'bond' | 'angle' | 'dihedral'

  /** Bead types along the term, in canonical direction. */
  @Column('text', { array: true })
  types!: string[]

  /** Everywhere along the chain where this type sequence stands. */
  @Column('jsonb')
  places!: Place[]

  /** Tells terms of one type sequence apart by place; empty where all places of the sequence are pooled. */
  @Column('text', { name: 'place_key' })
  placeKey!: string

  /** Place in the order in which the terms follow from the mapping. */
  @Column('integer')
  position!: number

  /** False once the mapping no longer has this sequence: the term stays for the data that stand on it. */
  @Column('boolean')
  current!: boolean

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @ManyToOne(() => Mapping, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_term_mapping' },
    { name: 'mapping_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_term_mapping' },
  ])
  mapping?: Mapping
}

import { Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type { MappingDocument, Place } from '../../shared/contracts/mapping'
import { Mapping } from './mapping.entity'
import { User } from './user.entity'

/** Where a term stood in a version of its mapping. */
export interface FrozenTerm {
  readonly termId: string
  readonly places: readonly Place[]
}

/** An earlier version of a mapping as it was last saved, frozen when its beads changed while data stood on it. */
@Entity('mapping_version')
@Unique('UQ_mapping_version_number', ['mappingId', 'number'])
export class MappingVersion {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_mapping_version' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'mapping_id' })
  mappingId!: string

  /** From 1. The newest version is the mapping itself. */
  @Column('integer')
  number!: number

  @Column('jsonb')
  document!: MappingDocument

  @Column('jsonb')
  terms!: readonly FrozenTerm[]

  @Column('timestamptz', { name: 'saved_at' })
  savedAt!: Date

  @Column('uuid', { name: 'saved_by', nullable: true })
  savedById!: string | null

  @ManyToOne(() => Mapping, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_mapping_version_mapping',
    },
    {
      name: 'mapping_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_mapping_version_mapping',
    },
  ])
  mapping?: Mapping

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'saved_by', foreignKeyConstraintName: 'FK_mapping_version_saved_by' })
  savedBy?: User | null
}

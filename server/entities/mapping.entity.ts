import { Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type { MappingDocument } from '../../shared/contracts/mapping'
import { Polymer } from './polymer.entity'
import { User } from './user.entity'

/** Which atoms of the repeat unit make which bead. */
@Entity('mapping')
@Unique('UQ_mapping_name', ['polymerId', 'name'])
@Unique('UQ_mapping_group', ['groupId', 'id'])
export class Mapping {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_mapping' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'polymer_id' })
  polymerId!: string

  @Column('text')
  name!: string

  @Column('jsonb')
  document!: MappingDocument

  /** The edit counter: whoever saves names the one they started from. */
  @Column('integer')
  revision!: number

  /** From 1; one more each time its beads change while data stand on it. Earlier ones are kept as `MappingVersion`. */
  @Column('integer')
  version!: number

  @Column('timestamptz', { name: 'saved_at' })
  savedAt!: Date

  @Column('uuid', { name: 'saved_by', nullable: true })
  savedById!: string | null

  @ManyToOne(() => Polymer, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_mapping_polymer' },
    { name: 'polymer_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_mapping_polymer' },
  ])
  polymer?: Polymer

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'saved_by', foreignKeyConstraintName: 'FK_mapping_saved_by' })
  savedBy?: User | null
}

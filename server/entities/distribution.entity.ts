import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type { Distribution as DistributionBody } from '../../shared/contracts/distribution'
import { StatePoint } from './state-point.entity'
import { Term } from './term.entity'
import { User } from './user.entity'

/** A measured histogram of one term at one state point, in internal units (nm, rad). */
@Entity('distribution')
@Unique('UQ_distribution_group', ['groupId', 'id'])
@Index('UQ_distribution_current', ['termId', 'statePointId'], {
  unique: true,
  where: '"superseded_at" IS NULL',
})
@Index('IX_distribution_term', ['termId'])
@Index('IX_distribution_state_point', ['statePointId'])
@Check('CK_distribution_shape', 'cardinality("edges") = cardinality("weights") + 1')
export class Distribution {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_distribution' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'term_id' })
  termId!: string

  @Column('uuid', { name: 'state_point_id' })
  statePointId!: string

  /** Ascending, one more than there are weights. */
  @Column('double precision', { array: true })
  edges!: number[]

  /** Counts, or probability masses for content density and probability. */
  @Column('double precision', { array: true })
  weights!: number[]

  @Column('enum', { enum: ['count', 'density', 'probability'], enumName: 'bin_content' })
  content!: 'count' | 'density' | 'probability'

  /** What the histogram stands for: as stated, or counts divided by the inefficiency of blocks; null when nobody knows. */
  @Column('double precision', { name: 'independent_samples', nullable: true })
  independentSamples!: number | null

  /** Statistical inefficiency from the scatter between blocks or chains; null where none came. */
  @Column('jsonb', { nullable: true })
  blocks!: DistributionBody['blocks']

  /** How correlated raw samples are in their order in the file; null for bins. */
  @Column('jsonb', { name: 'sample_inefficiency', nullable: true })
  sampleInefficiency!: DistributionBody['sampleInefficiency']

  /** How the file was read. */
  @Column('jsonb')
  settings!: DistributionBody['settings']

  @Column('text', { array: true })
  notes!: string[]

  /** A few points of the curve for the rail. */
  @Column('double precision', { array: true })
  silhouette!: number[]

  /** Of the bins, what they stand for, and the file they came from. */
  @Column('text', { name: 'content_sha256' })
  contentSha256!: string

  /** Revision of the mapping when the file came in. */
  @Column('integer', { name: 'mapping_revision' })
  mappingRevision!: number

  /** Version of the mapping that it was measured under. */
  @Column('integer', { name: 'mapping_version' })
  mappingVersion!: number

  @Column('timestamptz', { name: 'uploaded_at' })
  uploadedAt!: Date

  @Column('uuid', { name: 'uploaded_by', nullable: true })
  uploadedById!: string | null

  /** Set when a later file took its place. */
  @Column('timestamptz', { name: 'superseded_at', nullable: true })
  supersededAt!: Date | null

  @ManyToOne(() => Term, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_distribution_term' },
    { name: 'term_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_distribution_term' },
  ])
  term?: Term

  @ManyToOne(() => StatePoint, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_distribution_state_point',
    },
    {
      name: 'state_point_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_distribution_state_point',
    },
  ])
  statePoint?: StatePoint

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'uploaded_by', foreignKeyConstraintName: 'FK_distribution_uploaded_by' })
  uploadedBy?: User | null
}

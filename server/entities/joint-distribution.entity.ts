import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type {
  JointDistribution as JointDistributionBody,
  VerdictNumbers,
} from '../../shared/contracts/distribution'
import { Mapping } from './mapping.entity'
import { StatePoint } from './state-point.entity'
import { Term } from './term.entity'
import { User } from './user.entity'

/** A measured histogram of two terms together, in internal units. */
@Entity('joint_distribution')
@Unique('UQ_joint_distribution_group', ['groupId', 'id'])
@Index('UQ_joint_distribution_current', ['firstTermId', 'secondTermId', 'statePointId'], {
  unique: true,
  where: '"superseded_at" IS NULL',
})
@Index('IX_joint_distribution_mapping', ['mappingId'])
@Index('IX_joint_distribution_second_term', ['secondTermId'])
@Index('IX_joint_distribution_state_point', ['statePointId'])
@Check(
  'CK_joint_distribution_shape',
  'cardinality("weights") = (cardinality("x_edges") - 1) * (cardinality("y_edges") - 1)',
)
export class JointDistribution {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_joint_distribution' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'mapping_id' })
  mappingId!: string

  @Column('uuid', { name: 'first_term_id' })
  firstTermId!: string

  @Column('uuid', { name: 'second_term_id' })
  secondTermId!: string

  @Column('uuid', { name: 'state_point_id' })
  statePointId!: string

  @Column('double precision', { name: 'x_edges', array: true })
  xEdges!: number[]

  @Column('double precision', { name: 'y_edges', array: true })
  yEdges!: number[]

  /** Row-major: cell (x, y) stands at x * ny + y. */
  @Column('double precision', { array: true })
  weights!: number[]

  @Column('enum', { enum: ['count', 'density', 'probability'], enumName: 'bin_content' })
  content!: 'count' | 'density' | 'probability'

  @Column('double precision', { name: 'independent_samples', nullable: true })
  independentSamples!: number | null

  @Column('jsonb')
  settings!: JointDistributionBody['settings']

  @Column('text', { array: true })
  notes!: string[]

  /** The verdict as worked out when the file came in. */
  @Column('jsonb')
  numbers!: VerdictNumbers

  @Column('integer', { name: 'mapping_revision' })
  mappingRevision!: number

  /** Version of the mapping that it was measured under. */
  @Column('integer', { name: 'mapping_version' })
  mappingVersion!: number

  @Column('timestamptz', { name: 'uploaded_at' })
  uploadedAt!: Date

  @Column('uuid', { name: 'uploaded_by', nullable: true })
  uploadedById!: string | null

  @Column('timestamptz', { name: 'superseded_at', nullable: true })
  supersededAt!: Date | null

  @ManyToOne(() => Mapping, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_joint_distribution_mapping',
    },
    {
      name: 'mapping_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_joint_distribution_mapping',
    },
  ])
  mapping?: Mapping

  @ManyToOne(() => Term, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_joint_distribution_first_term',
    },
    {
      name: 'first_term_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_joint_distribution_first_term',
    },
  ])
  firstTerm?: Term

  @ManyToOne(() => Term, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_joint_distribution_second_term',
    },
    {
      name: 'second_term_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_joint_distribution_second_term',
    },
  ])
  secondTerm?: Term

  @ManyToOne(() => StatePoint, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_joint_distribution_state_point',
    },
    {
      name: 'state_point_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_joint_distribution_state_point',
    },
  ])
  statePoint?: StatePoint

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'uploaded_by', foreignKeyConstraintName: 'FK_joint_distribution_uploaded_by' })
  uploadedBy?: User | null
}

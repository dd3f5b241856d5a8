import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import { Distribution } from './distribution.entity'
import { JointDistribution } from './joint-distribution.entity'

/** The file a distribution was read from, as it came. Goes when its distribution goes. */
@Entity('source_file')
@Unique('UQ_source_file_distribution', ['groupId', 'distributionId'])
@Unique('UQ_source_file_joint_distribution', ['groupId', 'jointDistributionId'])
@Check('CK_source_file_owner', 'num_nonnulls("distribution_id", "joint_distribution_id") = 1')
export class SourceFile {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_source_file' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'distribution_id', nullable: true })
  distributionId!: string | null

  @Column('uuid', { name: 'joint_distribution_id', nullable: true })
  jointDistributionId!: string | null

  @Column('text')
  name!: string

  /** Bytes, before compression. */
  @Column('integer')
  size!: number

  @Column('text')
  sha256!: string

  /** Compressed with gzip. */
  @Column('bytea', { name: 'gzip', select: false })
  gzip!: Buffer

  @ManyToOne(() => Distribution, { onDelete: 'CASCADE', nullable: true })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_source_file_distribution',
    },
    {
      name: 'distribution_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_source_file_distribution',
    },
  ])
  distribution?: Distribution | null

  @ManyToOne(() => JointDistribution, { onDelete: 'CASCADE', nullable: true })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_source_file_joint_distribution',
    },
    {
      name: 'joint_distribution_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_source_file_joint_distribution',
    },
  ])
  jointDistribution?: JointDistribution | null
}

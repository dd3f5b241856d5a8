import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import { JointDistribution } from './joint-distribution.entity'
import { Potential } from './potential.entity'
import { User } from './user.entity'

/** Why a warning of a potential is kept. It holds for one input and one choice of settings; answers to others stay on record. */
@Entity('warning_answer')
@Unique('UQ_warning_answer_potential', ['potentialId', 'code', 'basisSha256'])
@Unique('UQ_warning_answer_joint_distribution', ['jointDistributionId', 'code', 'basisSha256'])
@Check('CK_warning_answer_owner', 'num_nonnulls("potential_id", "joint_distribution_id") = 1')
export class WarningAnswer {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_warning_answer' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'potential_id', nullable: true })
  potentialId!: string | null

  @Column('uuid', { name: 'joint_distribution_id', nullable: true })
  jointDistributionId!: string | null

  @Column('text')
  code!: string

  /** Hash of input and settings that the warning was answered for. */
  @Column('text', { name: 'basis_sha256' })
  basisSha256!: string

  @Column('text')
  reason!: string

  @Column('uuid', { name: 'answered_by', nullable: true })
  answeredById!: string | null

  @Column('timestamptz', { name: 'answered_at' })
  answeredAt!: Date

  @ManyToOne(() => Potential, { onDelete: 'CASCADE', nullable: true })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_warning_answer_potential',
    },
    {
      name: 'potential_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_warning_answer_potential',
    },
  ])
  potential?: Potential | null

  @ManyToOne(() => JointDistribution, { onDelete: 'CASCADE', nullable: true })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_warning_answer_joint_distribution',
    },
    {
      name: 'joint_distribution_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_warning_answer_joint_distribution',
    },
  ])
  jointDistribution?: JointDistribution | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'answered_by', foreignKeyConstraintName: 'FK_warning_answer_answered_by' })
  answeredBy?: User | null
}

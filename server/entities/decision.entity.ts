import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import type { DecisionWrite, VerdictNumbers } from '../../shared/contracts/distribution'
import { JointDistribution } from './joint-distribution.entity'
import { User } from './user.entity'

/** What a person decided about a pair of terms, and why. Earlier decisions stay on record. */
@Entity('decision')
@Index('UQ_decision_current', ['jointDistributionId'], { unique: true, where: '"superseded_at" IS NULL' })
export class Decision {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_decision' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'joint_distribution_id' })
  jointDistributionId!: string

  @Column('enum', { enum: ['joint', 'separate', 'change mapping'], enumName: 'decision_choice' })
  choice!: DecisionWrite['choice']

  @Column('text')
  reason!: string

  /** The verdict that stood beside it when the decision was taken. */
  @Column('jsonb')
  numbers!: VerdictNumbers

  @Column('timestamptz', { name: 'decided_at' })
  decidedAt!: Date

  @Column('uuid', { name: 'decided_by', nullable: true })
  decidedById!: string | null

  @Column('timestamptz', { name: 'superseded_at', nullable: true })
  supersededAt!: Date | null

  @ManyToOne(() => JointDistribution, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_decision_joint_distribution',
    },
    {
      name: 'joint_distribution_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_decision_joint_distribution',
    },
  ])
  jointDistribution?: JointDistribution

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'decided_by', foreignKeyConstraintName: 'FK_decision_decided_by' })
  decidedBy?: User | null
}

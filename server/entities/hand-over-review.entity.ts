import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import type { HandOverReview as HandOverReviewBody } from '../../shared/contracts/hand-over'
import { HandOver } from './hand-over.entity'
import { User } from './user.entity'

/** One time that a review was asked for, and what came of it. One of them is open at most. */
@Entity('hand_over_review')
@Index('IX_hand_over_review_hand_over', ['handOverId'])
@Index('UQ_hand_over_review_open', ['handOverId'], { unique: true, where: '"outcome" IS NULL' })
@Check('CK_hand_over_review_decided', '("outcome" IS NULL) = ("decided_at" IS NULL)')
export class HandOverReview {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_hand_over_review' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'hand_over_id' })
  handOverId!: string

  /** Hash of everything in the hand-over when review was asked for. */
  @Column('text', { name: 'content_sha256' })
  contentSha256!: string

  @Column('uuid', { name: 'asked_by', nullable: true })
  askedById!: string | null

  @Column('timestamptz', { name: 'asked_at' })
  askedAt!: Date

  @Column('text', { name: 'asked_note' })
  askedNote!: string

  @Column('uuid', { name: 'reviewer_id', nullable: true })
  reviewerId!: string | null

  /** null: nobody has decided yet. */
  @Column('enum', {
    enum: ['signed off', 'sent back', 'taken back', 'lapsed'],
    enumName: 'review_outcome',
    nullable: true,
  })
  outcome!: HandOverReviewBody['outcome']

  @Column('text')
  note!: string

  @Column('uuid', { name: 'decided_by', nullable: true })
  decidedById!: string | null

  @Column('timestamptz', { name: 'decided_at', nullable: true })
  decidedAt!: Date | null

  @ManyToOne(() => HandOver, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_hand_over_review_hand_over',
    },
    {
      name: 'hand_over_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_hand_over_review_hand_over',
    },
  ])
  handOver?: HandOver

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'asked_by', foreignKeyConstraintName: 'FK_hand_over_review_asked_by' })
  askedBy?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'reviewer_id', foreignKeyConstraintName: 'FK_hand_over_review_reviewer' })
  reviewer?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'decided_by', foreignKeyConstraintName: 'FK_hand_over_review_decided_by' })
  decidedBy?: User | null
}

import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import { HandOver } from './hand-over.entity'
import { Recipient } from './recipient.entity'
import { User } from './user.entity'

/** A question on a released hand-over, with the group's answer: both stand there for every recipient. */
@Entity('question')
@Index('IX_question_hand_over', ['handOverId'])
@Check(
  'CK_question_answered',
  '("answer" IS NULL) = ("answered_at" IS NULL) AND ("answered_by" IS NULL OR "answer" IS NOT NULL)',
)
export class Question {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_question' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'hand_over_id' })
  handOverId!: string

  /** Name of the table; null is about the whole hand-over. */
  @Column('text', { name: 'table_name', nullable: true })
  tableName!: string | null

  @Column('text')
  text!: string

  /** null: somebody of the group asked. */
  @Column('uuid', { name: 'recipient_id', nullable: true })
  recipientId!: string | null

  /** The account that asked; null by link. */
  @Column('uuid', { name: 'asked_by', nullable: true })
  askedById!: string | null

  @Column('timestamptz', { name: 'asked_at' })
  askedAt!: Date

  @Column('text', { nullable: true })
  answer!: string | null

  @Column('uuid', { name: 'answered_by', nullable: true })
  answeredById!: string | null

  @Column('timestamptz', { name: 'answered_at', nullable: true })
  answeredAt!: Date | null

  @ManyToOne(() => HandOver, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_question_hand_over' },
    { name: 'hand_over_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_question_hand_over' },
  ])
  handOver?: HandOver

  @ManyToOne(() => Recipient, { onDelete: 'CASCADE', nullable: true })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_question_recipient' },
    { name: 'recipient_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_question_recipient' },
  ])
  recipient?: Recipient | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'asked_by', foreignKeyConstraintName: 'FK_question_asked_by' })
  askedBy?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'answered_by', foreignKeyConstraintName: 'FK_question_answered_by' })
  answeredBy?: User | null
}

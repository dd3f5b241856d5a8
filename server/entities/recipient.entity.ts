import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import { HandOver } from './hand-over.entity'
import { User } from './user.entity'

/** Somebody outside, or a collaborator, whom a released hand-over was sent to. */
@Entity('recipient')
@Unique('UQ_recipient_group', ['groupId', 'id'])
@Unique('UQ_recipient_email', ['handOverId', 'email'])
@Unique('UQ_recipient_token', ['tokenSha256'])
@Check('CK_recipient_acknowledged', '("acknowledged_at" IS NULL) = ("acknowledged_by" IS NULL)')
export class Recipient {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_recipient' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'hand_over_id' })
  handOverId!: string

  @Column('text')
  name!: string

  /** In small letters. Whoever has an account with this address sees the hand-over there. */
  @Column('text')
  email!: string

  /** The account that the address had when it was sent; the address may change hands later. */
  @Column('uuid', { name: 'user_id', nullable: true })
  userId!: string | null

  /** Of the last link; those before lead nowhere. */
  @Column('text', { name: 'token_sha256' })
  tokenSha256!: string

  /** Of the links before: whoever opens one is told that there is a newer one. */
  @Column('text', { name: 'past_tokens_sha256', array: true })
  pastTokensSha256!: string[]

  /** How often it was sent. */
  @Column('integer')
  sent!: number

  @Column('timestamptz', { name: 'sent_at' })
  sentAt!: Date

  @Column('uuid', { name: 'sent_by', nullable: true })
  sentById!: string | null

  /** When the link ends; an account is let in until the delivery is revoked. */
  @Column('timestamptz', { name: 'expires_at' })
  expiresAt!: Date

  @Column('timestamptz', { name: 'revoked_at', nullable: true })
  revokedAt!: Date | null

  /** When the page was first looked at. */
  @Column('timestamptz', { name: 'opened_at', nullable: true })
  openedAt!: Date | null

  @Column('timestamptz', { name: 'acknowledged_at', nullable: true })
  acknowledgedAt!: Date | null

  /** The name that was given with it. */
  @Column('text', { name: 'acknowledged_by', nullable: true })
  acknowledgedBy!: string | null

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @ManyToOne(() => HandOver, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_recipient_hand_over' },
    { name: 'hand_over_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_recipient_hand_over' },
  ])
  handOver?: HandOver

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'user_id', foreignKeyConstraintName: 'FK_recipient_user' })
  user?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'sent_by', foreignKeyConstraintName: 'FK_recipient_sent_by' })
  sentBy?: User | null
}

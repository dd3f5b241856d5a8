import {
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import { Group } from './group.entity'

/** An e-mail to one recipient, queued in the transaction of the event it tells of. */
@Entity('mail')
@Unique('UQ_mail_event_key', ['eventKey'])
@Index('IX_mail_group', ['groupId', 'createdAt'])
export class Mail {
  /** Its Message-Id follows from it, so that a repeated one is known as the same. */
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_mail' })
  id!: string

  /** Names the event and the recipient: nobody is told twice of one event. */
  @Column('text', { name: 'event_key' })
  eventKey!: string

  /** null where no group is concerned, as for a new password. */
  @Column('uuid', { name: 'group_id', nullable: true })
  groupId!: string | null

  @Column('text')
  to!: string

  @Column('text')
  subject!: string

  /** Emptied once the mail is out or refused: it may hold a link that only the recipient should have. */
  @Column('text', { select: false })
  text!: string

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  /** When the mail server took it. */
  @Column('timestamptz', { name: 'sent_at', nullable: true })
  sentAt!: Date | null

  /** When it was given up: refused for good, or nobody answered for days. */
  @Column('timestamptz', { name: 'failed_at', nullable: true })
  failedAt!: Date | null

  /** What the mail server said last when it did not take it. */
  @Column('text', { name: 'last_error', nullable: true })
  lastError!: string | null

  @ManyToOne(() => Group, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'group_id', foreignKeyConstraintName: 'FK_mail_group' })
  group?: Group | null
}

import { Column, CreateDateColumn, Entity, PrimaryGeneratedColumn, Unique } from 'typeorm'

/** A mail that the local catcher took instead of a mail server: it stays on this machine. */
@Entity('caught_mail')
@Unique('UQ_caught_mail_message_id', ['messageId'])
export class CaughtMail {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_caught_mail' })
  id!: string

  @CreateDateColumn({ name: 'caught_at', type: 'timestamptz' })
  caughtAt!: Date

  @Column('text', { name: 'message_id' })
  messageId!: string

  @Column('text')
  from!: string

  @Column('text')
  to!: string

  @Column('text')
  subject!: string

  @Column('text')
  text!: string
}

import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import type { ReturnStanding } from '../../shared/contracts/delivery'
import { Recipient } from './recipient.entity'
import { User } from './user.entity'

/** A distribution that a recipient measured with one of the tables and sent back. It is nobody's data until somebody takes it. */
@Entity('returned_file')
@Index('IX_returned_file_recipient', ['recipientId'])
@Check('CK_returned_file_settled', `("standing" = 'new') = ("settled_at" IS NULL)`)
export class ReturnedFile {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_returned_file' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'recipient_id' })
  recipientId!: string

  @Column('text', { name: 'table_name' })
  tableName!: string

  @Column('text')
  name!: string

  /** In bytes, before compression. */
  @Column('integer')
  size!: number

  @Column('text')
  sha256!: string

  @Column('bytea', { select: false })
  gzip!: Buffer

  @Column('text')
  note!: string

  /** How it was read when it came. */
  @Column('text')
  reading!: string

  @Column('timestamptz', { name: 'returned_at' })
  returnedAt!: Date

  @Column('enum', { enum: ['new', 'taken', 'set aside'], enumName: 'return_standing' })
  standing!: ReturnStanding

  @Column('uuid', { name: 'settled_by', nullable: true })
  settledById!: string | null

  @Column('timestamptz', { name: 'settled_at', nullable: true })
  settledAt!: Date | null

  @ManyToOne(() => Recipient, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_returned_file_recipient',
    },
    {
      name: 'recipient_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_returned_file_recipient',
    },
  ])
  recipient?: Recipient

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'settled_by', foreignKeyConstraintName: 'FK_returned_file_settled_by' })
  settledBy?: User | null
}

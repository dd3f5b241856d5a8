import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import { Recipient } from './recipient.entity'

/** One file that a recipient took. */
@Entity('delivery_download')
@Index('IX_delivery_download_recipient', ['recipientId', 'at'])
export class DeliveryDownload {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_delivery_download' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'recipient_id' })
  recipientId!: string

  /** As it was called when it went out. */
  @Column('text')
  file!: string

  @Column('text')
  layout!: string

  @Column('enum', { enum: ['link', 'account'], enumName: 'delivery_way' })
  via!: 'link' | 'account'

  @Column('timestamptz')
  at!: Date

  @ManyToOne(() => Recipient, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_delivery_download_recipient',
    },
    {
      name: 'recipient_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_delivery_download_recipient',
    },
  ])
  recipient?: Recipient
}

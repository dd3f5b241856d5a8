import { Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import { HandOver } from './hand-over.entity'

/** A file of a released hand-over, byte for byte. Written with the release, never changed: a trigger sees to it. */
@Entity('hand_over_file')
@Unique('UQ_hand_over_file_path', ['handOverId', 'path'])
export class HandOverFile {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_hand_over_file' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'hand_over_id' })
  handOverId!: string

  /** In the order in which the files are listed. */
  @Column('integer')
  position!: number

  /** Its name in the archive. */
  @Column('text')
  path!: string

  @Column('text', { name: 'media_type' })
  mediaType!: string

  /** In bytes. */
  @Column('integer')
  size!: number

  @Column('text')
  sha256!: string

  @Column('bytea', { select: false })
  bytes!: Buffer

  @ManyToOne(() => HandOver, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_hand_over_file_hand_over',
    },
    {
      name: 'hand_over_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_hand_over_file_hand_over',
    },
  ])
  handOver?: HandOver
}

import { Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type { ReviewMark } from '../../shared/contracts/hand-over'
import { HandOver } from './hand-over.entity'
import { Term } from './term.entity'
import { User } from './user.entity'

/** What a reviewer says of a single term. It lapses when the table of the term changes. */
@Entity('hand_over_mark')
@Unique('UQ_hand_over_mark_term', ['handOverId', 'termId'])
export class HandOverMark {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_hand_over_mark' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'hand_over_id' })
  handOverId!: string

  @Column('uuid', { name: 'term_id' })
  termId!: string

  @Column('enum', { enum: ['questioned', 'accepted'], enumName: 'review_mark' })
  mark!: ReviewMark

  /** Hash of what the table of the term rests on when it was marked. */
  @Column('text', { name: 'content_sha256' })
  contentSha256!: string

  @Column('uuid', { name: 'marked_by', nullable: true })
  markedById!: string | null

  @Column('timestamptz', { name: 'marked_at' })
  markedAt!: Date

  @ManyToOne(() => HandOver, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_hand_over_mark_hand_over',
    },
    {
      name: 'hand_over_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_hand_over_mark_hand_over',
    },
  ])
  handOver?: HandOver

  @ManyToOne(() => Term, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_hand_over_mark_term' },
    { name: 'term_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_hand_over_mark_term' },
  ])
  term?: Term

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'marked_by', foreignKeyConstraintName: 'FK_hand_over_mark_marked_by' })
  markedBy?: User | null
}

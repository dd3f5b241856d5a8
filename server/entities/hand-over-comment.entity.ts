import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import { HandOver } from './hand-over.entity'
import { Term } from './term.entity'
import { User } from './user.entity'

/** What somebody of the group says about a hand-over or one of its terms. */
@Entity('hand_over_comment')
@Index('IX_hand_over_comment_hand_over', ['handOverId'])
export class HandOverComment {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_hand_over_comment' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'hand_over_id' })
  handOverId!: string

  /** null is about the whole hand-over. */
  @Column('uuid', { name: 'term_id', nullable: true })
  termId!: string | null

  @Column('text')
  text!: string

  @Column('uuid', { name: 'written_by', nullable: true })
  writtenById!: string | null

  @Column('timestamptz', { name: 'written_at' })
  writtenAt!: Date

  @ManyToOne(() => HandOver, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_hand_over_comment_hand_over',
    },
    {
      name: 'hand_over_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_hand_over_comment_hand_over',
    },
  ])
  handOver?: HandOver

  @ManyToOne(() => Term, { onDelete: 'CASCADE', nullable: true })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_hand_over_comment_term',
    },
    { name: 'term_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_hand_over_comment_term' },
  ])
  term?: Term | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'written_by', foreignKeyConstraintName: 'FK_hand_over_comment_written_by' })
  writtenBy?: User | null
}

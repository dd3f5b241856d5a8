import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import type { HistoryAction, HistoryDetails } from '../../shared/contracts/history'
import { Group } from './group.entity'
import { User } from './user.entity'

/** One thing that somebody did in a group. Written once, never changed. */
@Entity('event')
@Index('IX_event_group', ['groupId', 'id'])
export class Event {
  /** In the order of writing; a string, since it may outgrow a number. */
  @PrimaryGeneratedColumn('identity', {
    type: 'bigint',
    generatedIdentity: 'ALWAYS',
    primaryKeyConstraintName: 'PK_event',
  })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('timestamptz', { default: () => 'now()' })
  at!: Date

  @Column('uuid', { name: 'user_id', nullable: true })
  userId!: string | null

  /** Who or what acted where it was not a person signed in. */
  @Column('text', { nullable: true })
  by!: string | null

  @Column('text')
  action!: HistoryAction

  @Column('text', { name: 'subject_kind' })
  subjectKind!: string

  /** No foreign key: the event outlives its subject. */
  @Column('uuid', { name: 'subject_id', nullable: true })
  subjectId!: string | null

  /** As it was called then. */
  @Column('text', { name: 'subject_name' })
  subjectName!: string

  @Column('jsonb')
  details!: HistoryDetails

  @ManyToOne(() => Group, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'group_id', foreignKeyConstraintName: 'FK_event_group' })
  group?: Group

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'user_id', foreignKeyConstraintName: 'FK_event_user' })
  user?: User | null
}

import {
  Column,
  CreateDateColumn,
  Entity,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import { Group } from './group.entity'

/** A way of writing tables that a group gave a name. What it says stands in its versions. */
@Entity('layout')
@Unique('UQ_layout_name', ['groupId', 'name'])
@Unique('UQ_layout_group', ['groupId', 'id'])
export class Layout {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_layout' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('text')
  name!: string

  /** Number of the newest version: whoever saves names the one they started from. */
  @Column('integer')
  version!: number

  /** No longer offered; its versions stay readable. */
  @Column('timestamptz', { name: 'archived_at', nullable: true })
  archivedAt!: Date | null

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @ManyToOne(() => Group, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'group_id', foreignKeyConstraintName: 'FK_layout_group' })
  group?: Group
}

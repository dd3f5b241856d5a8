import { Column, CreateDateColumn, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn } from 'typeorm'
import type { Role } from '../../shared/contracts/common'
import { Group } from './group.entity'
import { User } from './user.entity'

/** What a person may do in a group. */
@Entity('membership')
@Index('IX_membership_user', ['userId'])
export class Membership {
  @PrimaryColumn('uuid', { name: 'group_id', primaryKeyConstraintName: 'PK_membership' })
  groupId!: string

  @PrimaryColumn('uuid', { name: 'user_id', primaryKeyConstraintName: 'PK_membership' })
  userId!: string

  @Column('enum', { enum: ['owner', 'modeller', 'reviewer', 'collaborator'], enumName: 'role' })
  role!: Role

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @ManyToOne(() => Group, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'group_id', foreignKeyConstraintName: 'FK_membership_group' })
  group?: Group

  @ManyToOne(() => User, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'user_id', foreignKeyConstraintName: 'FK_membership_user' })
  user?: User
}

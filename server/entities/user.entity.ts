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

/** A person. Belongs to groups by memberships. */
@Entity('user')
@Unique('UQ_user_email', ['email'])
export class User {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_user' })
  id!: string

  /** In lower case. */
  @Column('text')
  email!: string

  @Column('text')
  name!: string

  /** argon2id; null for a person of the demo, who signs in without a password. */
  @Column('text', { name: 'password_hash', nullable: true, select: false })
  passwordHash!: string | null

  /** Invented: one of the demo's people. */
  @Column('boolean', { default: false })
  demo!: boolean

  /** The group whose work the person looked at last. */
  @Column('uuid', { name: 'current_group_id', nullable: true })
  currentGroupId!: string | null

  @ManyToOne(() => Group, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'current_group_id', foreignKeyConstraintName: 'FK_user_current_group' })
  currentGroup?: Group | null

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date
}

import {
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import type { Role } from '../../shared/contracts/common'
import { Group } from './group.entity'
import { User } from './user.entity'

/** An invitation into a group by e-mail. Its link works until it is used, revoked or out of date. */
@Entity('invitation')
@Unique('UQ_invitation_token', ['tokenSha256'])
@Unique('UQ_invitation_group', ['groupId', 'id'])
@Index('UQ_invitation_open', ['groupId', 'email'], {
  unique: true,
  where: '"accepted_at" IS NULL AND "revoked_at" IS NULL',
})
export class Invitation {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_invitation' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  /** In lower case. */
  @Column('text')
  email!: string

  @Column('enum', { enum: ['owner', 'modeller', 'reviewer', 'collaborator'], enumName: 'role' })
  role!: Role

  /** Of the last link sent; earlier ones end with it. */
  @Column('text', { name: 'token_sha256', select: false })
  tokenSha256!: string

  /** How often it has been sent. */
  @Column('integer')
  sent!: number

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @Column('timestamptz', { name: 'expires_at' })
  expiresAt!: Date

  @Column('timestamptz', { name: 'accepted_at', nullable: true })
  acceptedAt!: Date | null

  @Column('timestamptz', { name: 'revoked_at', nullable: true })
  revokedAt!: Date | null

  @Column('uuid', { name: 'invited_by', nullable: true })
  invitedById!: string | null

  @ManyToOne(() => Group, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'group_id', foreignKeyConstraintName: 'FK_invitation_group' })
  group?: Group

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'invited_by', foreignKeyConstraintName: 'FK_invitation_invited_by' })
  invitedBy?: User | null
}

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
import type { KeyScope } from '../../shared/contracts/key'
import { User } from './user.entity'

/** A key by which a script acts for a person. Kept after it is revoked, for the record. */
@Entity('api_key')
@Unique('UQ_api_key_sha256', ['sha256'])
@Index('IX_api_key_user', ['userId', 'createdAt'])
export class ApiKey {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_api_key' })
  id!: string

  @Column('uuid', { name: 'user_id' })
  userId!: string

  /** What it is for. */
  @Column('text')
  name!: string

  @Column('text', { array: true })
  scopes!: KeyScope[]

  /** How the key begins, for the eye. */
  @Column('text')
  prefix!: string

  /** Of the whole key. It holds 256 random bits, so a fast hash without salt is enough. */
  @Column('text', { select: false })
  sha256!: string

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @Column('timestamptz', { name: 'expires_at', nullable: true })
  expiresAt!: Date | null

  /** Written once a minute at most. */
  @Column('timestamptz', { name: 'last_used_at', nullable: true })
  lastUsedAt!: Date | null

  @Column('timestamptz', { name: 'revoked_at', nullable: true })
  revokedAt!: Date | null

  @ManyToOne(() => User, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'user_id', foreignKeyConstraintName: 'FK_api_key_user' })
  user?: User
}

import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn } from 'typeorm'
import { User } from './user.entity'

/** A link by which someone sets a new password. All of a person's links are gone once one has been used. */
@Entity('password_reset')
export class PasswordReset {
  @PrimaryColumn('text', { name: 'token_sha256', primaryKeyConstraintName: 'PK_password_reset' })
  tokenSha256!: string

  @Column('uuid', { name: 'user_id' })
  userId!: string

  @Column('timestamptz', { name: 'expires_at' })
  expiresAt!: Date

  @ManyToOne(() => User, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'user_id', foreignKeyConstraintName: 'FK_password_reset_user' })
  user?: User
}

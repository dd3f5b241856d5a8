import { CreateDateColumn, Entity, PrimaryColumn } from 'typeorm'

/** A link by which the first owner comes in. All of them are gone once one has been used. */
@Entity('set_up_link')
export class SetUpLink {
  /** Only the hash is kept: whoever reads the database cannot use the link. */
  @PrimaryColumn('text', { name: 'token_sha256', primaryKeyConstraintName: 'PK_set_up_link' })
  tokenSha256!: string

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date
}

import { Column, Entity, Index, PrimaryColumn } from 'typeorm'

/** A signed-in (or visiting) browser. Read and written by the session store only. */
@Entity('session')
@Index('IX_session_expire', ['expire'])
export class SessionRecord {
  @PrimaryColumn('varchar', { primaryKeyConstraintName: 'PK_session' })
  sid!: string

  @Column('json')
  sess!: unknown

  @Column('timestamp', { precision: 6 })
  expire!: Date
}

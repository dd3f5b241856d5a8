import { Column, Entity, Index, PrimaryColumn } from 'typeorm'

/** Attempts within one window of time, counted for all server processes together. */
@Entity('attempt')
@Index('IX_attempt_ends', ['endsAt'])
export class Attempt {
  /** SHA-256 of what is counted: no address of e-mail or network is kept here. */
  @PrimaryColumn('text', { primaryKeyConstraintName: 'PK_attempt' })
  key!: string

  @Column('integer')
  count!: number

  @Column('timestamptz', { name: 'ends_at' })
  endsAt!: Date
}

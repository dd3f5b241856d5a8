import { Column, CreateDateColumn, Entity, PrimaryGeneratedColumn } from 'typeorm'

/** A research group. Every record of the science belongs to exactly one. */
@Entity('group')
export class Group {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_group' })
  id!: string

  @Column('text')
  name!: string

  /** Invented data: marked wherever it shows. */
  @Column('boolean', { default: false })
  demo!: boolean

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date
}

import { Column, CreateDateColumn, Entity, PrimaryGeneratedColumn } from 'typeorm'
import type { GroupDefaults } from '../../shared/contracts/group'

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

  /** What differs from the house's own defaults; see shared/contracts/group. */
  @Column('jsonb', { default: {} })
  defaults!: Partial<GroupDefaults>

  /** Key of a layout of the house, or id of one of the group; null: the house's own. */
  @Column('text', { name: 'default_layout', nullable: true })
  defaultLayout!: string | null

  /** Of the defaults. */
  @Column('integer', { default: 1 })
  revision!: number

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date
}

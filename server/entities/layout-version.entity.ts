import { Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type { LayoutDocument } from '../../shared/contracts/layout'
import { Layout } from './layout.entity'
import { User } from './user.entity'

/** A layout as it was saved once. Never changed. */
@Entity('layout_version')
@Unique('UQ_layout_version', ['layoutId', 'version'])
export class LayoutVersion {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_layout_version' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'layout_id' })
  layoutId!: string

  /** From 1. */
  @Column('integer')
  version!: number

  /** What the layout was called then. */
  @Column('text')
  name!: string

  @Column('jsonb')
  document!: LayoutDocument

  @Column('timestamptz', { name: 'saved_at' })
  savedAt!: Date

  @Column('uuid', { name: 'saved_by', nullable: true })
  savedById!: string | null

  @ManyToOne(() => Layout, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_layout_version_layout',
    },
    { name: 'layout_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_layout_version_layout' },
  ])
  layout?: Layout

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'saved_by', foreignKeyConstraintName: 'FK_layout_version_saved_by' })
  savedBy?: User | null
}

import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn } from 'typeorm'
import type { BlockKind } from '../../shared/histogram'
import { Distribution } from './distribution.entity'

/** The counts of one block or chain of a distribution, on its bins, with the file they came in. */
@Entity('distribution_block')
@Index('IX_distribution_block_distribution', ['distributionId'])
export class DistributionBlock {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_distribution_block' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'distribution_id' })
  distributionId!: string

  @Column('enum', { enum: ['time', 'chain'], enumName: 'block_kind' })
  kind!: BlockKind

  /** From 0 within a kind; time blocks in the order of time. */
  @Column('integer')
  position!: number

  @Column('double precision', { array: true })
  counts!: number[]

  /** null where the block is the distribution's own file, or a column of it. */
  @Column('text', { nullable: true })
  name!: string | null

  @Column('text', { nullable: true })
  sha256!: string | null

  /** Compressed with gzip. */
  @Column('bytea', { nullable: true, select: false })
  gzip!: Buffer | null

  @ManyToOne(() => Distribution, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_distribution_block_distribution',
    },
    {
      name: 'distribution_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_distribution_block_distribution',
    },
  ])
  distribution?: Distribution
}

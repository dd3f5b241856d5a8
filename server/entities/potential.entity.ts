import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type { PotentialSave } from '../../shared/contracts/potential'
import { Distribution } from './distribution.entity'
import { StatePoint } from './state-point.entity'
import { Term } from './term.entity'
import { User } from './user.entity'

/** A saved inversion: its settings and the hash of what it rests on. The numbers follow from them. */
@Entity('potential')
@Unique('UQ_potential_place', ['termId', 'statePointId'])
@Unique('UQ_potential_group', ['groupId', 'id'])
@Index('IX_potential_distribution', ['distributionId'])
@Index('IX_potential_state_point', ['statePointId'])
export class Potential {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_potential' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'term_id' })
  termId!: string

  @Column('uuid', { name: 'state_point_id' })
  statePointId!: string

  /** The distribution it was saved with; another one may have become current since. */
  @Column('uuid', { name: 'distribution_id' })
  distributionId!: string

  @Column('jsonb')
  settings!: PotentialSave['settings']

  @Column('text', { name: 'input_sha256' })
  inputSha256!: string

  /** A few points of the curve for the rail. */
  @Column('double precision', { array: true })
  silhouette!: number[]

  @Column('integer')
  revision!: number

  @Column('timestamptz', { name: 'saved_at' })
  savedAt!: Date

  @Column('uuid', { name: 'saved_by', nullable: true })
  savedById!: string | null

  @ManyToOne(() => Term, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_potential_term' },
    { name: 'term_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_potential_term' },
  ])
  term?: Term

  @ManyToOne(() => StatePoint, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_potential_state_point',
    },
    {
      name: 'state_point_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_potential_state_point',
    },
  ])
  statePoint?: StatePoint

  @ManyToOne(() => Distribution, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_potential_distribution',
    },
    {
      name: 'distribution_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_potential_distribution',
    },
  ])
  distribution?: Distribution

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'saved_by', foreignKeyConstraintName: 'FK_potential_saved_by' })
  savedBy?: User | null
}

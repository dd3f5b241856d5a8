import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryGeneratedColumn, Unique } from 'typeorm'
import type { FrozenTableMeta } from '../../shared/contracts/hand-over'
import type { CoordinateKind } from '../../shared/units'
import { HandOver } from './hand-over.entity'

/**
 * The numbers of a table of a released hand-over in full precision and internal units (nm, rad, kJ/mol), so that it can be
 * written in any layout later. Never changed: a trigger sees to it.
 */
@Entity('hand_over_table')
@Unique('UQ_hand_over_table_group', ['groupId', 'id'])
@Unique('UQ_hand_over_table_name', ['handOverId', 'name'])
@Check(
  'CK_hand_over_table_shape',
  `cardinality("energies") = cardinality("coordinates") * coalesce(cardinality("second_coordinates"), 1) AND cardinality("forces") = cardinality("energies") AND ("second_coordinates" IS NULL) = ("second_forces" IS NULL) AND cardinality("kinds") = CASE WHEN "second_coordinates" IS NULL THEN 1 ELSE 2 END`,
)
export class HandOverTable {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_hand_over_table' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'hand_over_id' })
  handOverId!: string

  @Column('integer')
  position!: number

  /** As in B–E–H, or E–H · B–E–H for two terms together. */
  @Column('text')
  name!: string

  /** Of its file among the frozen ones. */
  @Column('text')
  path!: string

  /** One, or two for a joint table. */
  @Column('text', { array: true })
  kinds!: CoordinateKind[]

  /** K */
  @Column('double precision')
  temperature!: number

  /** Ascending; those of the first axis of a joint table. */
  @Column('double precision', { array: true })
  coordinates!: number[]

  /** null for a single term. */
  @Column('double precision', { name: 'second_coordinates', array: true, nullable: true })
  secondCoordinates!: number[] | null

  /** kJ/mol, least value 0; of a joint table row-major: (x, y) stands at x * ny + y. */
  @Column('double precision', { array: true })
  energies!: number[]

  /** −dU/dq, along the first coordinate. */
  @Column('double precision', { array: true })
  forces!: number[]

  @Column('double precision', { name: 'second_forces', array: true, nullable: true })
  secondForces!: number[] | null

  @Column('jsonb')
  meta!: FrozenTableMeta

  /**
   * For a small picture. Of a term: energies up to 25 kJ/mol at 60 places over the domain, 0 lowest, 1 at the limit and above.
   * Of a joint table: a grid of 21 × 12 densities relative to the largest, row-major.
   */
  @Column('double precision', { array: true })
  silhouette!: number[]

  @ManyToOne(() => HandOver, { onDelete: 'CASCADE' })
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_hand_over_table_hand_over',
    },
    {
      name: 'hand_over_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_hand_over_table_hand_over',
    },
  ])
  handOver?: HandOver
}

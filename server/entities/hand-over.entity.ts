import {
  Check,
  Column,
  CreateDateColumn,
  Entity,
  Index,
  JoinColumn,
  ManyToOne,
  PrimaryGeneratedColumn,
  Unique,
} from 'typeorm'
import type {
  FrozenHandOver,
  HandOverLayout,
  HandOverSelection,
  HandOverStanding,
} from '../../shared/contracts/hand-over'
import { Group } from './group.entity'
import { Mapping } from './mapping.entity'
import { Polymer } from './polymer.entity'
import { StatePoint } from './state-point.entity'
import { User } from './user.entity'

/** A set of tables on its way out of the group. Once it has a number, triggers keep it as it is; only a withdrawal is added. */
@Entity('hand_over')
@Unique('UQ_hand_over_group', ['groupId', 'id'])
@Unique('UQ_hand_over_number', ['groupId', 'number'])
@Index('IX_hand_over_polymer', ['polymerId'])
@Index('IX_hand_over_mapping', ['mappingId'])
@Index('IX_hand_over_state_point', ['statePointId'])
@Check(
  'CK_hand_over_released',
  `("standing" IN ('released', 'withdrawn')) = ("number" IS NOT NULL AND "frozen" IS NOT NULL AND "released_at" IS NOT NULL AND "signed_off_at" IS NOT NULL)`,
)
@Check(
  'CK_hand_over_withdrawn',
  `("standing" = 'withdrawn') = ("withdrawn_at" IS NOT NULL AND "withdrawn_reason" IS NOT NULL)`,
)
export class HandOver {
  @PrimaryGeneratedColumn('uuid', { primaryKeyConstraintName: 'PK_hand_over' })
  id!: string

  @Column('uuid', { name: 'group_id' })
  groupId!: string

  @Column('uuid', { name: 'polymer_id' })
  polymerId!: string

  @Column('uuid', { name: 'mapping_id' })
  mappingId!: string

  /** Revision of the mapping that the selection was last made on; frozen with the release. */
  @Column('integer', { name: 'mapping_revision' })
  mappingRevision!: number

  @Column('uuid', { name: 'state_point_id' })
  statePointId!: string

  @Column('text')
  title!: string

  @Column('text')
  notes!: string

  @Column('jsonb')
  selection!: HandOverSelection

  @Column('jsonb')
  layout!: HandOverLayout

  @Column('enum', {
    enum: ['draft', 'in review', 'sent back', 'signed off', 'released', 'withdrawn'],
    enumName: 'hand_over_standing',
  })
  standing!: HandOverStanding

  /** From 1 within the group, without gaps; null until released. */
  @Column('integer', { nullable: true })
  number!: number | null

  /** The edit counter: whoever changes it names the one they started from. */
  @Column('integer')
  revision!: number

  @CreateDateColumn({ name: 'created_at', type: 'timestamptz' })
  createdAt!: Date

  @Column('timestamptz', { name: 'changed_at' })
  changedAt!: Date

  @Column('uuid', { name: 'author_id', nullable: true })
  authorId!: string | null

  /** Who was asked to review it last. */
  @Column('uuid', { name: 'reviewer_id', nullable: true })
  reviewerId!: string | null

  /** Hash of everything in it when review was asked for; what is signed off and released is this. */
  @Column('text', { name: 'content_sha256', nullable: true })
  contentSha256!: string | null

  @Column('uuid', { name: 'signed_off_by', nullable: true })
  signedOffById!: string | null

  @Column('timestamptz', { name: 'signed_off_at', nullable: true })
  signedOffAt!: Date | null

  @Column('uuid', { name: 'released_by', nullable: true })
  releasedById!: string | null

  @Column('timestamptz', { name: 'released_at', nullable: true })
  releasedAt!: Date | null

  /** The released hand-over of the same mapping and state point before this one. */
  @Column('uuid', { name: 'previous_id', nullable: true })
  previousId!: string | null

  /** Everything a page says about it, by value; null until released. */
  @Column('jsonb', { nullable: true })
  frozen!: FrozenHandOver | null

  @Column('uuid', { name: 'withdrawn_by', nullable: true })
  withdrawnById!: string | null

  @Column('timestamptz', { name: 'withdrawn_at', nullable: true })
  withdrawnAt!: Date | null

  @Column('text', { name: 'withdrawn_reason', nullable: true })
  withdrawnReason!: string | null

  @ManyToOne(() => Group, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'group_id', foreignKeyConstraintName: 'FK_hand_over_group' })
  group?: Group

  @ManyToOne(() => Polymer)
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_hand_over_polymer' },
    { name: 'polymer_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_hand_over_polymer' },
  ])
  polymer?: Polymer

  @ManyToOne(() => Mapping)
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_hand_over_mapping' },
    { name: 'mapping_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_hand_over_mapping' },
  ])
  mapping?: Mapping

  @ManyToOne(() => StatePoint)
  @JoinColumn([
    {
      name: 'group_id',
      referencedColumnName: 'groupId',
      foreignKeyConstraintName: 'FK_hand_over_state_point',
    },
    {
      name: 'state_point_id',
      referencedColumnName: 'id',
      foreignKeyConstraintName: 'FK_hand_over_state_point',
    },
  ])
  statePoint?: StatePoint

  @ManyToOne(() => HandOver, { nullable: true })
  @JoinColumn([
    { name: 'group_id', referencedColumnName: 'groupId', foreignKeyConstraintName: 'FK_hand_over_previous' },
    { name: 'previous_id', referencedColumnName: 'id', foreignKeyConstraintName: 'FK_hand_over_previous' },
  ])
  previous?: HandOver | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'author_id', foreignKeyConstraintName: 'FK_hand_over_author' })
  author?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'reviewer_id', foreignKeyConstraintName: 'FK_hand_over_reviewer' })
  reviewer?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'signed_off_by', foreignKeyConstraintName: 'FK_hand_over_signed_off_by' })
  signedOffBy?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'released_by', foreignKeyConstraintName: 'FK_hand_over_released_by' })
  releasedBy?: User | null

  @ManyToOne(() => User, { onDelete: 'SET NULL', nullable: true })
  @JoinColumn({ name: 'withdrawn_by', foreignKeyConstraintName: 'FK_hand_over_withdrawn_by' })
  withdrawnBy?: User | null
}

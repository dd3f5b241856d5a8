import { type DataSource, type EntityManager, In, IsNull } from 'typeorm'
import { InvalidInputError } from '../../shared/errors'
import type { Layout } from '../../shared/layouts'
import { Decision } from '../entities/decision.entity'
import { Group } from '../entities/group.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { Polymer } from '../entities/polymer.entity'
import { SourceFile } from '../entities/source-file.entity'
import { Term } from '../entities/term.entity'
import { HttpError, notFound } from '../errors/http-error'
import { layoutFor } from './find-layout'
import {
  type JointTableFile,
  type JointTableFileUnits,
  type JointTableWriting,
  type JointTableSource,
  writeJointTableFile,
} from './joint-table-file'
import { type Fit, pairReason, readFit, UNFIT_DATA } from './mapping-fit'
import type { Download, Member } from './member'
import { placeNumber } from './stored-term-name'
import type { TableSource } from './table-file'
import { jointTableFileName, nameInLayout } from './table-names'
import { findStatePoint, findTerm, mappingOf } from './term-context'

type Background = Pick<TableSource, 'polymer' | 'mapping' | 'statePoint' | 'invented'>

/** Tables of joint potentials as files. The same stored data and units give the same bytes. */
export class JointTableService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * The table of the joint potential of two terms.
   *
   * @throws {HttpError} NOT_FOUND
   * @throws {InvalidInputError} SAMPLE_SIZE_UNKNOWN, or what else the core refuses
   */
  async forPair(
    { groupId }: Member,
    jointDistributionId: string,
    writing: JointTableWriting,
  ): Promise<Download> {
    const { manager } = this.dataSource
    const { document } = await layoutFor(manager, groupId, writing)
    const joint = await manager.findOneBy(JointDistribution, { id: jointDistributionId, groupId })
    if (!joint) throw notFound('joint distribution')
    const terms = await termsOf(manager, joint)
    const mapping = await mappingOf(manager, terms[0])
    const unfit = pairReason(await readFit(manager, mapping), idsOf(joint), joint.mappingVersion)
    if (unfit !== null) {
      throw new HttpError('CONFLICT', `There is no joint table for these terms: ${UNFIT_DATA} ${unfit}`)
    }
    const { polymerId } = mapping
    const statePoint = await findStatePoint(manager, groupId, polymerId, joint.statePointId, 'statePoint')
    const polymer = await manager.findOneByOrFail(Polymer, { id: polymerId })
    const { demo } = await manager.findOneByOrFail(Group, { id: groupId })
    const file = await fileOf(manager, joint)
    const placeNumbers = await placeNumbersOf(manager, terms)
    const source = { polymer, mapping, statePoint, invented: demo, terms, placeNumbers, joint, file }
    return {
      fileName: nameInLayout(jointTableName(source), document),
      bytes: Buffer.from(writeJointTableFile(source, writing, document).text),
    }
  }
}

/** As in joint_B-E_B-E-H_400K.txt. */
export function jointTableName({
  terms: [x, y],
  placeNumbers,
  statePoint,
}: Pick<JointTableSource, 'terms' | 'placeNumbers' | 'statePoint'>): string {
  return jointTableFileName({ types: [x.types, y.types], temperature: statePoint.temperature, placeNumbers })
}

/** The joint table of a pair that it was decided for, or the reason why its data give none. */
export type JointOutcome =
  | { readonly source: JointTableSource; readonly file: JointTableFile; readonly reason: null }
  | { readonly source: JointTableSource; readonly file: null; readonly reason: string }

/** The joint tables of a mapping at a state point, of the pairs whose recorded decision asks for one, in the order of terms. */
export async function jointOutcomes(
  manager: EntityManager,
  background: Background,
  units: JointTableFileUnits,
  layout: Layout,
): Promise<JointOutcome[]> {
  const decided = await decidedPairs(manager, background)
  const sources = await Promise.all(
    decided.map(async (joint) => {
      const terms = await termsOf(manager, joint)
      const placeNumbers = await placeNumbersOf(manager, terms)
      return { ...background, joint, terms, placeNumbers, file: await fileOf(manager, joint) }
    }),
  )
  const fit = await readFit(manager, background.mapping)
  return sources
    .filter(({ terms }) => terms.every(({ current }) => current))
    .sort((one, other) => placeOf(one, 0) - placeOf(other, 0) || placeOf(one, 1) - placeOf(other, 1))
    .map((source) => outcomeOf(source, fit, (each) => writeJointTableFile(each, units, layout)))
}

const placeOf = ({ terms }: JointTableSource, axis: 0 | 1): number => terms[axis].position

/** One pair that the core refuses must not hold back the tables of all others. */
function outcomeOf(
  source: JointTableSource,
  fit: Fit,
  write: (source: JointTableSource) => JointTableFile,
): JointOutcome {
  const unfit = pairReason(fit, idsOf(source.joint), source.joint.mappingVersion)
  if (unfit !== null) return { source, file: null, reason: `${UNFIT_DATA} ${unfit}` }
  try {
    return { source, file: write(source), reason: null }
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    return { source, file: null, reason: error.message }
  }
}

async function decidedPairs(
  manager: EntityManager,
  { mapping, statePoint }: Background,
): Promise<JointDistribution[]> {
  const joints = await manager.findBy(JointDistribution, {
    mappingId: mapping.id,
    statePointId: statePoint.id,
    supersededAt: IsNull(),
  })
  const decisions = await manager.findBy(Decision, {
    jointDistributionId: In(joints.map(({ id }) => id)),
    choice: 'joint',
    supersededAt: IsNull(),
  })
  const decided = new Set(decisions.map(({ jointDistributionId }) => jointDistributionId))
  return joints.filter(({ id }) => decided.has(id))
}

async function termsOf(manager: EntityManager, joint: JointDistribution): Promise<[Term, Term]> {
  const { groupId, firstTermId, secondTermId } = joint
  return [await findTerm(manager, groupId, firstTermId), await findTerm(manager, groupId, secondTermId)]
}

function fileOf(manager: EntityManager, { id }: JointDistribution): Promise<SourceFile> {
  return manager.findOneByOrFail(SourceFile, { jointDistributionId: id })
}

const idsOf = ({ firstTermId, secondTermId }: JointDistribution): string[] => [firstTermId, secondTermId]

async function placeNumbersOf(
  manager: EntityManager,
  [x, y]: readonly [Term, Term],
): Promise<NonNullable<JointTableSource['placeNumbers']>> {
  const terms = await manager.find(Term, { where: { mappingId: x.mappingId }, order: { position: 'ASC' } })
  const numberOf = ({ id }: Term): number | undefined => {
    const own = terms.find((each) => each.id === id)
    return own && placeNumber(own, terms)
  }
  return [numberOf(x), numberOf(y)]
}

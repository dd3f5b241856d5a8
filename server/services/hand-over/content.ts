import { type EntityManager, In, IsNull } from 'typeorm'
import { inversionSettingsSchema } from '../../../shared/contracts/potential'
import type { InversionSettings } from '../../../shared/inversion'
import { usedTerms } from '../../../shared/mapping'
import { Decision } from '../../entities/decision.entity'
import { Group } from '../../entities/group.entity'
import type { HandOver } from '../../entities/hand-over.entity'
import { JointDistribution } from '../../entities/joint-distribution.entity'
import { Mapping } from '../../entities/mapping.entity'
import { Polymer } from '../../entities/polymer.entity'
import { Potential } from '../../entities/potential.entity'
import { SourceFile } from '../../entities/source-file.entity'
import { StatePoint } from '../../entities/state-point.entity'
import { Term } from '../../entities/term.entity'
import { WarningAnswer } from '../../entities/warning-answer.entity'
import { findInversionInput, type InversionInput } from '../inversion-input'
import { type Fit, pairReason, readFit } from '../mapping-fit'
import { placeNumber, storedTermName } from '../stored-term-name'
import type { TableSource } from '../table-file'
import { leaveOutReason } from '../table-readme'
import { answerBasis, contentSha256, jointBasis, potentialBasis } from './content-hash'

/** A term of the mapping as a hand-over takes it. */
export interface ContentTerm {
  readonly term: Term
  readonly name: string
  /** Which term of its sequence it is, where the sequence is split by its places. */
  readonly placeNumber: number | undefined
  /** Why it has no table: left out by the mapping, or here; null for one that is handed over. */
  readonly leftOut: { readonly by: 'mapping' | 'hand-over'; readonly reason: string } | null
  /** Its current data. */
  readonly input: InversionInput | null
  readonly potential: Potential | null
  readonly settings: InversionSettings | null
  /** Saved, but its data have changed since. */
  readonly stale: boolean
  /** Why its data do not fit the mapping as it is; null where they fit. */
  readonly unfit: string | null
  /** Hash of data and settings; null without a potential. */
  readonly basis: string | null
  /** To warnings of these data and settings, with who gave them. */
  readonly answers: readonly WarningAnswer[]
}

/** Two terms that joint data are there of, both handed over. */
export interface ContentPair {
  readonly joint: JointDistribution
  readonly file: SourceFile
  readonly terms: readonly [ContentTerm, ContentTerm]
  readonly decision: Decision | null
  /** Why no joint table is handed over although it was decided for; null otherwise. */
  readonly apart: string | null
  /** A joint table takes the place of the two single ones. */
  readonly together: boolean
  /** Why the joint data do not fit the mapping as it is; null where they fit. */
  readonly unfit: string | null
  readonly answers: readonly WarningAnswer[]
}

/** Everything a hand-over would hold if it were released now. */
export interface HandOverContent extends Pick<
  TableSource,
  'polymer' | 'mapping' | 'statePoint' | 'invented'
> {
  readonly group: Group
  /** In the order in which they follow from the mapping. */
  readonly terms: readonly ContentTerm[]
  readonly pairs: readonly ContentPair[]
  /** Of all of it: another hash means that something changed. */
  readonly sha256: string
}

/** Reads what a hand-over would hold now. Inside a transaction that locked it, nothing of it can change until the end. */
export async function readContent(manager: EntityManager, handOver: HandOver): Promise<HandOverContent> {
  const { groupId, polymerId, mappingId, statePointId, selection } = handOver
  const group = await manager.findOneByOrFail(Group, { id: groupId })
  const polymer = await manager.findOneByOrFail(Polymer, { id: polymerId })
  const mapping = await manager.findOneByOrFail(Mapping, { id: mappingId })
  const statePoint = await manager.findOneByOrFail(StatePoint, { id: statePointId })
  const stored = await manager.find(Term, { where: { mappingId, current: true }, order: { position: 'ASC' } })
  const potentials = await manager.find(Potential, {
    where: { termId: In(stored.map(({ id }) => id)), statePointId },
    relations: { savedBy: true },
  })
  const answers = await answersOf(manager, 'potentialId', potentials)
  const used = new Set(usedTerms(mapping.document, stored))
  const fit = await readFit(manager, mapping)
  const terms: ContentTerm[] = []
  for (const term of stored) {
    const here = selection.leftOut.find(({ termId }) => termId === term.id)
    const leftOut = !used.has(term)
      ? { by: 'mapping' as const, reason: leaveOutReason(mapping.document, term) }
      : here
        ? { by: 'hand-over' as const, reason: here.reason }
        : null
    const input = await findInversionInput(manager, term, statePoint)
    const potential = potentials.find(({ termId }) => termId === term.id) ?? null
    const basis = potential && potentialBasis(potential)
    terms.push({
      term,
      name: storedTermName(term, stored),
      placeNumber: placeNumber(term, stored),
      leftOut,
      input,
      potential,
      settings: potential && inversionSettingsSchema.parse(potential.settings),
      stale: potential !== null && potential.inputSha256 !== input?.sha256,
      unfit: input && fit.reason(term.id, input.distribution.mappingVersion),
      basis,
      answers: answers.filter(
        ({ potentialId, code, basisSha256 }) =>
          basis !== null &&
          potentialId === potential?.id &&
          basisSha256 === answerBasis(basis, code, mapping.version),
      ),
    })
  }
  const pairs = await readPairs(manager, handOver, mapping.version, terms, fit)
  const invented = group.demo
  const content = { group, polymer, mapping, statePoint, invented, terms, pairs }
  return { ...content, sha256: contentSha256(handOver, content) }
}

async function readPairs(
  manager: EntityManager,
  { mappingId, statePointId, selection }: HandOver,
  mappingVersion: number,
  terms: readonly ContentTerm[],
  fit: Fit,
): Promise<ContentPair[]> {
  const joints = await manager.find(JointDistribution, {
    where: { mappingId, statePointId, supersededAt: IsNull() },
    order: { id: 'ASC' },
  })
  const ids = In(joints.map(({ id }) => id))
  const decisions = await manager.find(Decision, {
    where: { jointDistributionId: ids, supersededAt: IsNull() },
    relations: { decidedBy: true },
  })
  const files = await manager.find(SourceFile, {
    where: { jointDistributionId: ids },
    select: { id: true, jointDistributionId: true, name: true, sha256: true },
  })
  const answers = await answersOf(manager, 'jointDistributionId', joints)
  const find = (id: string): ContentTerm | undefined => terms.find(({ term }) => term.id === id)
  const pairs = joints.flatMap((joint): ContentPair[] => {
    const [first, second] = [find(joint.firstTermId), find(joint.secondTermId)]
    const file = files.find(({ jointDistributionId }) => jointDistributionId === joint.id)
    if (!first || !second || !file || first.leftOut || second.leftOut) return []
    const decision = decisions.find(({ jointDistributionId }) => jointDistributionId === joint.id) ?? null
    const apart = selection.apart.find(({ firstTermId, secondTermId }) =>
      [firstTermId, secondTermId].every((id) => id === joint.firstTermId || id === joint.secondTermId),
    )
    const together = decision?.choice === 'joint' && !apart
    const own = answers.filter(
      ({ jointDistributionId, code, basisSha256 }) =>
        jointDistributionId === joint.id &&
        basisSha256 === answerBasis(jointBasis(joint), code, mappingVersion),
    )
    const unfit = pairReason(fit, [joint.firstTermId, joint.secondTermId], joint.mappingVersion)
    return [
      {
        joint,
        file,
        terms: [first, second],
        decision,
        apart: apart?.reason ?? null,
        together,
        unfit,
        answers: own,
      },
    ]
  })
  const place = ({ terms: [first, second] }: ContentPair): number =>
    first.term.position * 10_000 + second.term.position
  return pairs.sort((one, other) => place(one) - place(other))
}

function answersOf(
  manager: EntityManager,
  owner: 'potentialId' | 'jointDistributionId',
  owners: readonly { readonly id: string }[],
): Promise<WarningAnswer[]> {
  return manager.find(WarningAnswer, {
    where: { [owner]: In(owners.map(({ id }) => id)) },
    relations: { answeredBy: true },
    order: { answeredAt: 'ASC' },
  })
}

/** The terms that a joint table takes the place of. */
export function joinedTerms({ pairs }: Pick<HandOverContent, 'pairs'>): Set<string> {
  return new Set(
    pairs.filter(({ together }) => together).flatMap(({ terms }) => terms.map(({ term }) => term.id)),
  )
}

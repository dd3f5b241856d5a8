import { type EntityManager, In, IsNull } from 'typeorm'
import type { ComparedPair } from '../../shared/contracts/comparison'
import { usedTerms } from '../../shared/mapping'
import { Decision } from '../entities/decision.entity'
import { Distribution } from '../entities/distribution.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import type { Mapping } from '../entities/mapping.entity'
import { Potential } from '../entities/potential.entity'
import type { StatePoint } from '../entities/state-point.entity'
import { Term } from '../entities/term.entity'
import { inputSha256 } from './histograms'
import { type Fit, pairReason, readFit } from './mapping-fit'
import { storedTermName } from './stored-term-name'
import { termPairs } from './term-pairs'

/** A term of a mapping with where its data are. */
export interface CoveredTerm {
  readonly term: Term
  readonly name: string
  readonly used: boolean
  /** Its current data at the state point, where they fit the mapping. */
  readonly distribution: Distribution | null
  /** Why the data that are there do not fit; null where they do. */
  readonly unfit: string | null
  /** Other state points with data that fit, in the order of their ids. */
  readonly elsewhere: readonly string[]
  /** What its counts are divided by, as somebody saved it for these very data. */
  readonly inefficiency: number | null
}

/** What is stored of a mapping at a state point. */
export interface StoredEvidence {
  readonly mapping: Mapping
  /** The terms that follow from the mapping, in their order. */
  readonly terms: readonly CoveredTerm[]
  /** Pairs of used terms with joint data. */
  readonly pairs: readonly ComparedPair[]
  readonly pairsWithoutData: number
}

/** Reads what a comparison of mappings rests on. */
export async function readEvidence(
  manager: EntityManager,
  mapping: Mapping,
  point: StatePoint,
): Promise<StoredEvidence> {
  const stored = await manager.find(Term, {
    where: { mappingId: mapping.id, current: true },
    order: { position: 'ASC' },
  })
  const fit = await readFit(manager, mapping)
  const terms = await coveredTerms(manager, mapping, stored, point, fit)
  const used = terms.filter((each) => each.used)
  const pairs = await measuredPairs(manager, used, point, fit)
  const pairsWithoutData = termPairs(used.map(({ term }) => term)).length - pairs.length
  return { mapping, terms, pairs, pairsWithoutData: Math.max(0, pairsWithoutData) }
}

async function coveredTerms(
  manager: EntityManager,
  mapping: Mapping,
  terms: readonly Term[],
  point: StatePoint,
  fit: Fit,
): Promise<CoveredTerm[]> {
  const termId = In(terms.map(({ id }) => id))
  const here = await manager.findBy(Distribution, {
    termId,
    statePointId: point.id,
    supersededAt: IsNull(),
  })
  const everywhere = await manager.find(Distribution, {
    where: { termId, supersededAt: IsNull() },
    select: { id: true, termId: true, statePointId: true, mappingVersion: true },
    order: { statePointId: 'ASC' },
  })
  const potentials = await manager.findBy(Potential, { termId, statePointId: point.id })
  const used = new Set(usedTerms(mapping.document, terms))
  return terms.map((term): CoveredTerm => {
    const measured = here.find((each) => each.termId === term.id) ?? null
    const unfit = measured && fit.reason(term.id, measured.mappingVersion)
    const distribution = unfit === null ? measured : null
    const input = distribution && inputSha256(distribution.contentSha256, point.temperature)
    const saved = potentials.find((each) => each.termId === term.id && each.inputSha256 === input)
    return {
      term,
      name: storedTermName(term, terms),
      used: used.has(term),
      distribution,
      unfit,
      elsewhere: everywhere
        .filter((each) => each.termId === term.id && each.statePointId !== point.id)
        .filter(({ mappingVersion }) => fit.reason(term.id, mappingVersion) === null)
        .map(({ statePointId }) => statePointId),
      inefficiency: saved?.settings.inefficiency ?? null,
    }
  })
}

async function measuredPairs(
  manager: EntityManager,
  used: readonly CoveredTerm[],
  point: StatePoint,
  fit: Fit,
): Promise<ComparedPair[]> {
  const ids = In(used.map(({ term }) => term.id))
  const measured = await manager.find(JointDistribution, {
    where: { firstTermId: ids, secondTermId: ids, statePointId: point.id, supersededAt: IsNull() },
    select: { id: true, firstTermId: true, secondTermId: true, numbers: true, mappingVersion: true },
  })
  const joints = measured.filter(
    ({ firstTermId, secondTermId, mappingVersion }) =>
      pairReason(fit, [firstTermId, secondTermId], mappingVersion) === null,
  )
  const decisions = await manager.findBy(Decision, {
    jointDistributionId: In(joints.map(({ id }) => id)),
    supersededAt: IsNull(),
  })
  const nameOf = (id: string): string => used.find(({ term }) => term.id === id)?.name ?? ''
  return joints.map(({ id, firstTermId, secondTermId, numbers }): ComparedPair => {
    const { mutualInformation, mutualInformationCorrected } = numbers
    return {
      firstTermId,
      secondTermId,
      first: nameOf(firstTermId),
      second: nameOf(secondTermId),
      nats: Math.max(0, mutualInformationCorrected ?? mutualInformation),
      corrected: mutualInformationCorrected !== null,
      decision: decisions.find(({ jointDistributionId }) => jointDistributionId === id)?.choice ?? null,
    }
  })
}

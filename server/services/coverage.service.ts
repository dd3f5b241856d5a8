import { type DataSource, type EntityManager, In, IsNull } from 'typeorm'
import type { Coverage } from '../../shared/contracts/comparison'
import type { CoverageCell, MappingCoverage } from '../../shared/contracts/mapping-coverage'
import { choiceOf, usedTerms } from '../../shared/mapping'
import { Distribution } from '../entities/distribution.entity'
import { Mapping } from '../entities/mapping.entity'
import { Potential } from '../entities/potential.entity'
import { StatePoint } from '../entities/state-point.entity'
import { Term } from '../entities/term.entity'
import { notFound } from '../errors/http-error'
import { inputSha256 } from './histograms'
import { type Fit, readFit } from './mapping-fit'
import type { Member } from './member'
import { storedTermName } from './stored-term-name'

type Measured = Pick<Distribution, 'termId' | 'statePointId' | 'contentSha256' | 'mappingVersion'>

/** Which terms of a mapping have data at which state points. */
export class CoverageService {
  constructor(private readonly dataSource: DataSource) {}

  /** The terms that the mapping has, in their order, by the state points of its polymer. @throws {HttpError} NOT_FOUND */
  async of({ groupId }: Member, mappingId: string): Promise<MappingCoverage> {
    const { manager } = this.dataSource
    const mapping = await manager.findOneBy(Mapping, { id: mappingId, groupId })
    if (!mapping) throw notFound('mapping')
    const { polymerId, document } = mapping
    const points = await manager.find(StatePoint, {
      where: { groupId, polymerId },
      order: { temperature: 'ASC', createdAt: 'ASC', id: 'ASC' },
    })
    const terms = await manager.find(Term, {
      where: { mappingId, current: true },
      order: { position: 'ASC' },
    })
    const measured = await measuredAt(manager, terms)
    const potentials = await manager.findBy(Potential, { termId: In(terms.map(({ id }) => id)) })
    const fit = await readFit(manager, mapping)
    const used = new Set(usedTerms(document, terms))
    return {
      statePointIds: points.map(({ id }) => id),
      terms: terms.map((term) => {
        const own = measured.filter(({ termId }) => termId === term.id)
        const saved = potentials.filter(({ termId }) => termId === term.id)
        const { id, kind, types } = term
        return {
          id,
          kind,
          name: storedTermName(term, terms),
          types,
          leftOut: used.has(term) ? null : (choiceOf(document, term)?.reason ?? ''),
          cells: points.map((point) => cellOf(point, own, saved, fit)),
        }
      }),
    }
  }
}

function measuredAt(manager: EntityManager, terms: readonly Term[]): Promise<Measured[]> {
  return manager.find(Distribution, {
    where: { termId: In(terms.map(({ id }) => id)), supersededAt: IsNull() },
    select: { id: true, termId: true, statePointId: true, contentSha256: true, mappingVersion: true },
  })
}

function cellOf(
  { id: statePointId, temperature }: StatePoint,
  measured: readonly Measured[],
  potentials: readonly Potential[],
  fit: Fit,
): CoverageCell {
  const fits = ({ termId, mappingVersion }: Measured): boolean => fit.reason(termId, mappingVersion) === null
  const here = measured.find((each) => each.statePointId === statePointId)
  const elsewhere = measured.some((each) => each !== here && fits(each))
  const reason = here ? fit.reason(here.termId, here.mappingVersion) : null
  const input = here && inputSha256(here.contentSha256, temperature)
  const inverted = potentials.some((each) => each.statePointId === statePointId && each.inputSha256 === input)
  return {
    statePointId,
    coverage: coverageOf(here !== undefined, reason, elsewhere),
    inverted: inverted && reason === null,
    reason,
  }
}

/** What a term has at a state point, from whether there are data, why they do not fit, and whether others do elsewhere. */
export function coverageOf(here: boolean, reason: string | null, elsewhere: boolean): Coverage {
  if (here) return reason === null ? 'here' : 'unfit'
  return elsewhere ? 'elsewhere' : 'missing'
}

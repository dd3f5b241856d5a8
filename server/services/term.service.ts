import { type DataSource, In, IsNull } from 'typeorm'
import type { Term as TermBody } from '../../shared/contracts/mapping'
import { Distribution } from '../entities/distribution.entity'
import { Mapping } from '../entities/mapping.entity'
import { Potential } from '../entities/potential.entity'
import { Term } from '../entities/term.entity'
import { notFound } from '../errors/http-error'
import { inputSha256 } from './histograms'
import { readFit } from './mapping-fit'
import type { Member } from './member'
import { storedTermName } from './stored-term-name'
import { findStatePoint } from './term-context'

/** What is known of a term at one state point. */
interface TermFacts {
  readonly distribution: Pick<Distribution, 'id' | 'silhouette'>
  /** The saved inversion, unless its input has changed since. */
  readonly potential: Potential | undefined
  /** One is saved whose input has changed since. */
  readonly stale: boolean
  /** Why the data do not fit the mapping. */
  readonly unfit: string | null
}

/** Terms of a mapping with how far each is. */
export class TermService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * The terms of a mapping in the order in which they follow from it, vanished ones with data last.
   *
   * @param statePointId null tells only which terms there are
   */
  async list({ groupId }: Member, mappingId: string, statePointId: string | null): Promise<TermBody[]> {
    const { manager } = this.dataSource
    const mapping = await manager.findOneBy(Mapping, { id: mappingId, groupId })
    if (!mapping) throw notFound('mapping')
    const terms = await manager.find(Term, {
      where: { mappingId },
      order: { current: 'DESC', position: 'ASC', id: 'ASC' },
    })
    const facts =
      statePointId === null ? new Map<string, TermFacts>() : await this.facts(mapping, terms, statePointId)
    return terms.map((term) => termBody(term, storedTermName(term, terms), facts.get(term.id)))
  }

  private async facts(
    mapping: Mapping,
    terms: readonly Term[],
    statePointId: string,
  ): Promise<Map<string, TermFacts>> {
    const { manager } = this.dataSource
    const point = await findStatePoint(
      manager,
      mapping.groupId,
      mapping.polymerId,
      statePointId,
      'statePoint',
    )
    const where = { termId: In(terms.map(({ id }) => id)), statePointId }
    const distributions = await manager.find(Distribution, {
      where: { ...where, supersededAt: IsNull() },
      select: { id: true, termId: true, silhouette: true, contentSha256: true, mappingVersion: true },
    })
    const potentials = await manager.findBy(Potential, where)
    const fit = await readFit(manager, mapping)
    return new Map(
      distributions.map((distribution) => {
        const { termId, contentSha256, mappingVersion } = distribution
        const input = inputSha256(contentSha256, point.temperature)
        const saved = potentials.find((each) => each.termId === termId)
        const stale = saved !== undefined && saved.inputSha256 !== input
        const unfit = fit.reason(termId, mappingVersion)
        return [termId, { distribution, potential: stale ? undefined : saved, stale, unfit }]
      }),
    )
  }
}

function termBody(term: Term, name: string, facts: TermFacts | undefined): TermBody {
  const { id, mappingId, kind, types, places, placeKey, current } = term
  const { distribution, potential, unfit = null } = facts ?? {}
  const standing = potential ? 'inverted' : distribution ? 'data' : 'no data'
  return {
    id,
    mappingId,
    kind,
    types,
    name,
    places,
    placeKey,
    current,
    // A term that the mapping no longer has keeps its standing: nothing is asked of it.
    standing: unfit !== null && current ? 'no data' : standing,
    silhouette: distribution
      ? { measured: distribution.silhouette, derived: potential?.silhouette ?? null }
      : null,
    distributionId: distribution?.id ?? null,
    unfit: current ? unfit : null,
    stale: facts?.stale ?? false,
  }
}

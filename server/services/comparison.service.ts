import { setImmediate } from 'node:timers/promises'
import { type DataSource, In } from 'typeorm'
import { parseRepeatUnit } from '../../shared/chemistry'
import type {
  ComparedMapping as ComparedMappingBody,
  ComparedTerm as ComparedTermBody,
  Comparison,
} from '../../shared/contracts/comparison'
import { type ComparedMapping, compareMappings, type MappingEvidence } from '../../shared/mapping'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import type { StatePoint } from '../entities/state-point.entity'
import { notFound } from '../errors/http-error'
import { type CoveredTerm, readEvidence, type StoredEvidence } from './comparison-evidence'
import { coverageOf } from './coverage.service'
import { thresholdsOf } from './group.service'
import { histogramOf } from './histograms'
import type { Member } from './member'
import { findStatePoint } from './term-context'
import { type StoredFinding, termFinding } from './term-finding'

/** Findings kept in memory: our limit, some hundred kilobytes. Each costs an inversion of a few milliseconds. */
const MOST_KEPT = 2000

/** Findings by the name of their term. */
type Findings = ReadonlyMap<string, StoredFinding>

/** Mappings of a polymer side by side. */
export class ComparisonService {
  /** By everything a finding rests on, the oldest first. */
  private readonly kept = new Map<string, StoredFinding>()

  constructor(private readonly dataSource: DataSource) {}

  /**
   * What each mapping has at a state point and what its data say, with a summary of what the finer ones buy.
   *
   * @param mappingIds of mappings of this polymer, each once
   * @throws {HttpError} NOT_FOUND with the field that named it
   */
  async compare(
    { groupId }: Member,
    polymerId: string,
    mappingIds: readonly string[],
    statePointId: string,
  ): Promise<Comparison> {
    const { manager } = this.dataSource
    const polymer = await manager.findOneBy(Polymer, { id: polymerId, groupId })
    if (!polymer) throw notFound('polymer')
    const point = await findStatePoint(manager, groupId, polymerId, statePointId, 'statePoint')
    const found = await manager.findBy(Mapping, { id: In([...mappingIds]), polymerId, groupId })
    const mappings = mappingIds.map((id) => {
      const mapping = found.find((each) => each.id === id)
      if (!mapping) throw notFound('mapping of this polymer', 'mappings')
      return mapping
    })
    const columns: { stored: StoredEvidence; findings: Findings }[] = []
    for (const mapping of mappings) {
      const stored = await readEvidence(manager, mapping, point)
      columns.push({ stored, findings: await this.findings(stored.terms, point) })
    }
    const unit = await parseRepeatUnit(polymer.smiles)
    const comparison = compareMappings(
      unit,
      columns.map(({ stored, findings }) => evidenceOf(stored, findings)),
    )
    return {
      statePointId,
      summary: [...comparison.summary],
      mappings: comparison.mappings.map((column, index) =>
        mappingBody(column, columns[index].stored, columns[index].findings),
      ),
    }
  }

  /** One inversion after the other, with room for other requests between them. */
  private async findings(
    terms: readonly CoveredTerm[],
    { groupId, temperature }: StatePoint,
  ): Promise<Findings> {
    const { flatBelow } = await thresholdsOf(this.dataSource.manager, groupId)
    const findings = new Map<string, StoredFinding>()
    for (const { term, name, used, distribution, inefficiency } of terms) {
      if (!used || distribution === null) continue
      const key = `${distribution.contentSha256} ${temperature} ${inefficiency} ${flatBelow}`
      let finding = this.kept.get(key)
      if (finding === undefined) {
        await setImmediate()
        finding = termFinding(histogramOf(term.kind, distribution), temperature, inefficiency, flatBelow)
        this.keep(key, finding)
      }
      findings.set(name, finding)
    }
    return findings
  }

  private keep(key: string, finding: StoredFinding): void {
    const [oldest] = this.kept.keys()
    if (this.kept.size >= MOST_KEPT && oldest !== undefined) this.kept.delete(oldest)
    this.kept.set(key, finding)
  }
}

function evidenceOf({ mapping, terms, pairs }: StoredEvidence, findings: Findings): MappingEvidence {
  return {
    name: mapping.name,
    document: mapping.document,
    terms: terms.map(({ term, name }) => {
      const { kind, types, places, placeKey } = term
      return { kind, types, name, places, placeKey }
    }),
    findings,
    pairs,
  }
}

function mappingBody(
  column: ComparedMapping,
  { mapping, terms, pairs, pairsWithoutData }: StoredEvidence,
  findings: Findings,
): ComparedMappingBody {
  const { name, numbers, leftOut, coupling, cost } = column
  const multiplicities = new Map(column.terms.map((term) => [term.name, term.multiplicity]))
  return {
    id: mapping.id,
    name,
    numbers,
    terms: terms
      .filter(({ used }) => used)
      .map((covered) => termBody(covered, multiplicities.get(covered.name) ?? 0, findings)),
    leftOut,
    pairs: pairs.toSorted((a, b) => b.nats - a.nats),
    pairsWithoutData,
    coupling,
    cost,
  }
}

function termBody(covered: CoveredTerm, multiplicity: number, findings: Findings): ComparedTermBody {
  const { id, kind, types } = covered.term
  const {
    basins = null,
    deviation = null,
    flatness = null,
    problem = null,
  } = findings.get(covered.name) ?? {}
  const elsewhere = [...covered.elsewhere]
  const { unfit } = covered
  const here = covered.distribution !== null || unfit !== null
  return {
    id,
    kind,
    name: covered.name,
    types,
    multiplicity,
    coverage: coverageOf(here, unfit, elsewhere.length > 0),
    unfit,
    elsewhere,
    basins,
    deviation,
    flatness,
    problem,
  }
}

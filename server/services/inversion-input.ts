import { type EntityManager, IsNull } from 'typeorm'
import type { Histogram } from '../../shared/histogram'
import { Distribution } from '../entities/distribution.entity'
import { SourceFile } from '../entities/source-file.entity'
import type { StatePoint } from '../entities/state-point.entity'
import type { Term } from '../entities/term.entity'
import { histogramOf, inputSha256 } from './histograms'

/** What an inversion of a term at a state point rests on now. */
export interface InversionInput {
  readonly distribution: Distribution
  readonly histogram: Histogram
  readonly file: Pick<SourceFile, 'name' | 'sha256'>
  /** Hash of all of it with the temperature; a saved inversion whose hash differs is stale. */
  readonly sha256: string
}

/** The current distribution of a term at a state point, ready to invert; null when there is none. */
export async function findInversionInput(
  manager: EntityManager,
  term: Term,
  statePoint: StatePoint,
): Promise<InversionInput | null> {
  const distribution = await manager.findOneBy(Distribution, {
    termId: term.id,
    statePointId: statePoint.id,
    supersededAt: IsNull(),
  })
  if (!distribution) return null
  const file = await manager.findOneByOrFail(SourceFile, { distributionId: distribution.id })
  const histogram = histogramOf(term.kind, distribution)
  return {
    distribution,
    histogram,
    file,
    sha256: inputSha256(distribution.contentSha256, statePoint.temperature),
  }
}

import type { BinContent } from '@shared/histogram'
import type { CoordinateKind } from '@shared/units'
import { csvText, type CsvColumn } from '@shared/csv'
import { captionSentences, type FigureCaption } from '@/components/figure/figure-caption'
import { PLAIN_SYMBOLS } from '@/components/figure/plain-symbols'
import type { Point } from '@/components/figure/stepped-outline'
import type { FigureModel } from './figure-model'

const JACOBIANS: Record<CoordinateKind, string> = { bond: 'r^2', angle: 'sin theta', dihedral: '' }

const NOTES = [
  'Left columns: one row per bin, half-open, the last one closed. Right columns: one row per point of the potential.',
  'p: mean of the distribution over the bin. regenerated: the same from U.',
  'residual: (n - expected)/sqrt(expected), counts divided by the statistical inefficiency; empty without a sample size.',
  'U: least value 0 within the data. Band: 95 % of U - U_min; empty where it is not known.',
]

/**
 * What the bench figure draws, as numbers: on the left bin by bin, on the right the potential with its band. All curves,
 * also those the key has switched off.
 *
 * @param content what the file held: without counts the share of each bin is given instead
 * @param jacobian whether the inversion divides by the Jacobian: the comparison is the other way
 */
export function benchCsv(
  model: FigureModel,
  content: BinContent,
  jacobian: boolean,
  caption: FigureCaption,
): string {
  return csvText(
    [...captionSentences(caption), ...NOTES],
    [...binColumns(model, content), ...potentialColumns(model, jacobian)],
  )
}

function binColumns({ kind, names, energyUnit, bins }: FigureModel, content: BinContent): CsvColumn[] {
  const coordinate = PLAIN_SYMBOLS[kind]
  const unit = `(${names.axisUnit})`
  const last = bins.edges.length - 1
  const total = bins.weights.reduce((sum, weight) => sum + weight, 0)
  return [
    { header: `${coordinate} low ${unit}`, values: bins.edges.subarray(0, last) },
    { header: `${coordinate} high ${unit}`, values: bins.edges.subarray(1) },
    content === 'count'
      ? { header: 'count', values: bins.weights }
      : { header: 'share', values: bins.weights.map((weight) => weight / total) },
    { header: `p measured (${names.densityUnit})`, values: bins.measured },
    { header: `p regenerated (${names.densityUnit})`, values: bins.regenerated },
    { header: 'residual (sigma)', values: bins.residuals ?? [] },
    { header: `${coordinate} centroid ${unit}`, values: bins.centroids },
    { header: `U bin by bin (${energyUnit})`, values: bins.energies },
  ]
}

/** Tails and data in one ascending row of points. */
function potentialColumns(model: FigureModel, jacobian: boolean): CsvColumn[] {
  const { kind, names, energyUnit, potential, halfWidths, smooth, comparison, tails } = model
  const start = potential[0][0]
  // A tail shares its inner end with the curve.
  const before = tails.filter((tail) => tail[0][0] < start).flatMap((tail) => tail.slice(0, -1))
  const after = tails.filter((tail) => tail[0][0] >= start).flatMap((tail) => tail.slice(1))
  const points = [...before, ...potential, ...after]
  const within = <Value>(of: (point: Point, index: number) => Value): (Value | null)[] => [
    ...before.map(() => null),
    ...potential.map(of),
    ...after.map(() => null),
  ]
  const edge = (side: number) => within(([, energy], index) => energy + side * (halfWidths?.[index] ?? NaN))
  return [
    {
      header: `${PLAIN_SYMBOLS[kind]} (${names.axisUnit})`,
      values: points.map(([coordinate]) => coordinate),
    },
    { header: `U (${energyUnit})`, values: points.map(([, energy]) => energy) },
    { header: 'range', values: within(() => 'data').map((range) => range ?? 'tail') },
    { header: `U band low (${energyUnit})`, values: edge(-1) },
    { header: `U band high (${energyUnit})`, values: edge(1) },
    ...(smooth === null
      ? []
      : [{ header: `U smooth curve (${energyUnit})`, values: within((_, index) => smooth[index][1]) }]),
    ...(comparison === null
      ? []
      : [
          {
            header: `U ${jacobian ? 'without' : 'with'} ${JACOBIANS[kind]} (${energyUnit})`,
            values: within((_, index) => comparison[index][1]),
          },
        ]),
  ]
}

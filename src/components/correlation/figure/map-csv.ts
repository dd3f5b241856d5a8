import type { Correlation } from '@shared/correlation'
import { csvText, type CsvColumn } from '@shared/csv'
import { captionSentences, type FigureCaption } from '@/components/figure/figure-caption'
import { PLAIN_SYMBOLS } from '@/components/figure/plain-symbols'
import type { PairNames } from '../verdict-words'
import { drawnCoupling } from './map-cells'
import type { MapAxis, MapModel } from './map-model'

const NOTES = [
  'Left columns: one row per cell of the map, half-open. Right columns: the mean in each bin, then the bins of each coordinate alone.',
  'density: share of the cell over its exact volume (r^2 dr, sin theta dtheta, dphi). averaged: as coloured, thin cells with their neighbours.',
  'coupling: ln[p12/(p1 p2)], of the merged cell that holds the cell; empty where too thin to judge.',
]
/** Volumes of bonds are in nm³, those of angles have no unit. */
const DENSITY_UNITS = ['', ' (nm^-3)', ' (nm^-6)'] as const

/**
 * What the map draws, as numbers: density and coupling cell by cell, the mean of the second coordinate at each value of the
 * first, both distributions alone. Contours follow from the density.
 *
 * @param weights of the cells, row-major, as the file held them
 */
export function mapCsv(
  correlation: Correlation,
  model: MapModel,
  weights: ArrayLike<number>,
  names: PairNames,
  caption: FigureCaption,
): string {
  // Spreadsheets and scripts find a plain hyphen more easily than the dash of term names.
  const [x, y] = correlation.kinds.map(
    (kind, index) => `${PLAIN_SYMBOLS[kind]}(${names[index].replaceAll('–', '-')})`,
  )
  return csvText(
    [...captionSentences(caption), ...NOTES],
    [
      ...cellColumns(correlation, model, weights, [x, y]),
      ...meanColumns(model, [x, y]),
      ...aloneColumns(model.x, correlation.marginals.x, x),
      ...aloneColumns(model.y, correlation.marginals.y, y),
    ],
  )
}

function cellColumns(
  correlation: Correlation,
  model: MapModel,
  weights: ArrayLike<number>,
  [x, y]: readonly string[],
): CsvColumn[] {
  const ny = model.y.edges.length - 1
  const cells = Array.from(weights)
  const total = cells.reduce((sum, weight) => sum + weight, 0)
  const unit = DENSITY_UNITS[correlation.kinds.filter((kind) => kind === 'bond').length]
  const coupling = drawnCoupling(correlation)
  const edge = (axis: 'x' | 'y', side: 0 | 1): number[] =>
    cells.map((_, index) => model[axis].edges[(axis === 'x' ? Math.floor(index / ny) : index % ny) + side])
  const bounds = (axis: 'x' | 'y', name: string): CsvColumn[] => [
    { header: `${name} low (${model[axis].names.axisUnit})`, values: edge(axis, 0) },
    { header: `${name} high (${model[axis].names.axisUnit})`, values: edge(axis, 1) },
  ]
  return [
    ...bounds('x', x),
    ...bounds('y', y),
    correlation.content === 'count'
      ? { header: 'count', values: cells }
      : { header: 'share', values: cells.map((weight) => weight / total) },
    { header: `density${unit}`, values: correlation.density },
    { header: `density averaged${unit}`, values: model.shown },
    { header: 'coupling (kT)', values: coupling.values },
    { header: 'coupling sigma (kT)', values: coupling.deviations },
  ]
}

function meanColumns({ mean, x, y }: MapModel, [first, second]: readonly string[]): CsvColumn[] {
  return [
    { header: `${first} (${x.names.axisUnit})`, values: mean.map((point) => point.x) },
    { header: `mean ${second} (${y.names.axisUnit})`, values: mean.map((point) => point.mean) },
    { header: `mean ${second} 95 % half width (${y.names.axisUnit})`, values: mean.map(({ half }) => half) },
  ]
}

function aloneColumns({ edges, names }: MapAxis, masses: Float64Array, name: string): CsvColumn[] {
  const last = edges.length - 1
  return [
    { header: `${name} alone low (${names.axisUnit})`, values: edges.subarray(0, last) },
    { header: `${name} alone high (${names.axisUnit})`, values: edges.subarray(1) },
    { header: `${name} alone share`, values: masses },
  ]
}

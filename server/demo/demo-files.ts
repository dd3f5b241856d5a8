import type { CoordinateKind } from '../../shared/histogram/histogram'
import type { DistributionUpload, JointDistributionUpload } from '../../shared/contracts/distribution'
import type { CoordinateUnit } from '../../shared/units'
import { inefficiencyBetweenChains } from './chain-scatter'
import type { ChainCounts, Ensemble, PairCounts } from './measure-chains'

/** A text file as a user would upload it, and how it is read. */
export interface DemoFile<Settings> {
  readonly name: string
  readonly text: string
  readonly settings: Settings
}

/** What the comment lines say about where a file comes from. */
export interface DemoOrigin {
  readonly mapping: string
  readonly temperature: number
  readonly seed: number
  readonly ensemble: Ensemble
}

/** Bins without counts that are written on either side of the data, so that the data do not touch the edge of the file. */
const PADDING = 3

const UNITS = {
  bond: { unit: 'nm', symbol: 'nm', scale: 1, digits: 4 },
  angle: { unit: 'degree', symbol: 'deg', scale: 180 / Math.PI, digits: 1 },
  dihedral: { unit: 'degree', symbol: 'deg', scale: 180 / Math.PI, digits: 1 },
} as const satisfies Record<
  CoordinateKind,
  { unit: CoordinateUnit; symbol: string; scale: number; digits: number }
>

/**
 * Centre and count per line.
 *
 * @param types bead types of the term, such as ['B', 'E', 'H']
 */
export function distributionFile(
  types: readonly string[],
  counted: ChainCounts,
  origin: DemoOrigin,
): DemoFile<DistributionUpload['settings']> {
  const { kind, low, width, perChain } = counted
  const { unit, symbol, scale, digits } = UNITS[kind]
  const counts = sumOfRows(perChain)
  const inefficiency = inefficiencyBetweenChains(perChain)
  const independentSamples = Math.round(total(counts) / inefficiency)
  const [from, to] = writtenRange(kind, counts)
  const term = types.join('-')
  const lines = commentLines(`${term} (${kind})`, origin, inefficiency, independentSamples)
  lines.push(
    `# ${COORDINATE[kind]} / ${symbol}, count; ${(width * scale).toPrecision(2)} ${symbol} wide bins`,
  )
  for (let bin = from; bin < to; bin++) {
    lines.push(`${((low + (bin + 0.5) * width) * scale).toFixed(digits)} ${counts[bin]}`)
  }
  return {
    name: `${origin.mapping}_${term}_${origin.temperature}K.txt`,
    text: lines.join('\n') + '\n',
    settings: {
      version: 1,
      kind,
      unit,
      layout: 'centre',
      value: 'count',
      columns: { low: 0, high: 0, value: 1 },
      alreadyDivided: false,
      independentSamples,
    },
  }
}

/**
 * A grid in long form: x, y and count per line.
 *
 * @param kinds of the two terms, as counted
 */
export function jointFile(
  types: readonly [readonly string[], readonly string[]],
  kinds: [CoordinateKind, CoordinateKind],
  counted: PairCounts,
  origin: DemoOrigin,
): DemoFile<JointDistributionUpload['settings']> {
  const [nx, ny] = counted.bins
  const counts = sumOfRows(counted.perChain)
  const inefficiency = inefficiencyBetweenChains(counted.perChain, ny)
  const independentSamples = Math.round(total(counts) / inefficiency)
  const alongX = Float64Array.from({ length: nx }, (_, x) => total(counts.subarray(x * ny, (x + 1) * ny)))
  const alongY = Float64Array.from({ length: ny }, (_, y) =>
    alongX.reduce((sum, _x, x) => sum + counts[x * ny + y], 0),
  )
  const [fromX, toX] = writtenRange(kinds[0], alongX)
  const [fromY, toY] = writtenRange(kinds[1], alongY)
  const names = types.map((sequence) => sequence.join('-'))
  const lines = commentLines(names.join(' with '), origin, inefficiency, independentSamples)
  lines.push(`# ${kinds.map((kind) => `${COORDINATE[kind]} / ${UNITS[kind].symbol}`).join(', ')}, count`)
  const at = (axis: 0 | 1, bin: number) => {
    const { scale, digits } = UNITS[kinds[axis]]
    return ((counted.lows[axis] + (bin + 0.5) * counted.widths[axis]) * scale).toFixed(digits)
  }
  for (let x = fromX; x < toX; x++) {
    for (let y = fromY; y < toY; y++) lines.push(`${at(0, x)} ${at(1, y)} ${counts[x * ny + y]}`)
  }
  return {
    name: `${origin.mapping}_${names.join('_with_')}_${origin.temperature}K.txt`,
    text: lines.join('\n') + '\n',
    settings: {
      version: 1,
      kinds,
      units: [UNITS[kinds[0]].unit, UNITS[kinds[1]].unit],
      layout: 'grid',
      value: 'count',
      columns: { x: 0, y: 1, value: 2 },
      independentSamples,
    },
  }
}

/** The sum of the chains. */
export function sumOfRows(rows: readonly Float64Array[]): Float64Array {
  return rows[0].map((_, bin) => rows.reduce((sum, row) => sum + row[bin], 0))
}

const COORDINATE = { bond: 'r', angle: 'theta', dihedral: 'phi' } as const

function commentLines(
  what: string,
  { mapping, temperature, seed, ensemble }: DemoOrigin,
  inefficiency: number,
  independentSamples: number,
): string[] {
  return [
    '# INVENTED data (demonstration): drawn from a seeded stochastic model of a chain,',
    '# not from a simulation or a measurement of any polymer. Not for use.',
    `# mapping ${mapping}, ${what}, ${temperature} K`,
    `# ${ensemble.chains} chains of ${ensemble.units} repeat units, ${ensemble.frames} frames each, seed ${seed}`,
    `# statistical inefficiency ${inefficiency.toFixed(1)} (scatter between chains), independent samples ${independentSamples}`,
  ]
}

/** Bins to write: those that hold something, and a few beyond, within the domain; a dihedral's whole turn. */
function writtenRange(kind: CoordinateKind, counts: Float64Array): [number, number] {
  if (kind === 'dihedral') return [0, counts.length]
  const first = counts.findIndex((count) => count > 0)
  const last = counts.findLastIndex((count) => count > 0)
  return [Math.max(0, first - PADDING), Math.min(counts.length, last + 1 + PADDING)]
}

function total(counts: Float64Array): number {
  return counts.reduce((sum, count) => sum + count, 0)
}

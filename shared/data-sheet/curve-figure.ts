import type { CurveFigure } from '../contracts/data-sheet'
import type { HandOverLayout } from '../contracts/hand-over'
import type { DerivedPotential } from '../forms'
import { type Inversion, potentialEnergy } from '../inversion'
import { type CoordinateKind, coordinateFromInternal, energyScale, thermalEnergy, unitSymbol } from '../units'
import { figureNumber } from './figure-number'

/** Bins that a small figure can show; more are merged. */
const MOST_BINS = 120
const POINTS = 161
/** Half width of a 95 % band in standard deviations. */
const BAND_DEVIATIONS = 1.96
/** Share of the populated range that is shown on either side of it. */
const MARGIN = 0.12
/** The energy axis ends between these, in kT. */
const ENERGIES = { least: 2, most: 10 } as const

type Units = Pick<HandOverLayout, 'length' | 'angle' | 'energy'>

/** The unit of a coordinate in the files. */
export function coordinateUnitOf(kind: CoordinateKind, { length, angle }: Units) {
  return kind === 'bond' ? length : angle
}

/** What the figure of a single table draws: the measured distribution, what the table makes of it, and the potential with its band. */
export function curveFigure({ inversion }: DerivedPotential, units: Units): CurveFigure {
  const { kind, temperature, potential } = inversion
  const unit = coordinateUnitOf(kind, units)
  const scale = energyScale(units.energy, temperature)
  const place = (coordinate: number): number => figureNumber(coordinateFromInternal(coordinate, unit))
  const energy = (value: number): number => figureNumber(value * scale)
  const [low, high] = shownRange(inversion)
  const { groups, ...bins } = mergedBins(inversion, low, high)
  const widths = groups.map((_, bin) => coordinateFromInternal(bins.edges[bin + 1] - bins.edges[bin], unit))
  const coordinates = Array.from(
    { length: POINTS },
    (_, point) => low + ((high - low) * point) / (POINTS - 1),
  )
  return {
    kind,
    coordinateUnit: unitSymbol(unit),
    energyUnit: unitSymbol(units.energy),
    shown: [place(low), place(high)],
    populated: [place(potential.populated[0]), place(potential.populated[1])],
    limit: energy(shownEnergy(inversion)),
    edges: bins.edges.map(place),
    measured: bins.measured.map((mass, bin) => figureNumber(mass / widths[bin])),
    regenerated: bins.regenerated.map((mass, bin) => figureNumber(mass / widths[bin])),
    raw: bins.raw.map((value) => (Number.isNaN(value) ? null : energy(value + inversion.rawOffset))),
    band:
      bins.deviations === null
        ? null
        : bins.deviations.map((value) => (Number.isNaN(value) ? null : energy(BAND_DEVIATIONS * value))),
    potential: {
      coordinates: coordinates.map(place),
      energies: coordinates.map((coordinate) => energy(potentialEnergy(potential, coordinate))),
    },
  }
}

/** Where the data live with a margin, within the domain of the kind; of a dihedral the whole turn. */
function shownRange({ kind, potential: { populated } }: Inversion): [number, number] {
  if (kind === 'dihedral') return [-Math.PI, Math.PI]
  const [low, high] = populated
  const margin = MARGIN * (high - low)
  return [Math.max(0, low - margin), kind === 'angle' ? Math.min(Math.PI, high + margin) : high + margin]
}

/** Up to where energies are shown, kJ/mol: what the data reach, but enough for a flat curve to look flat and no wall. */
function shownEnergy({ potential, bins }: Inversion): number {
  const kT = thermalEnergy(potential.temperature)
  const [low, high] = potential.populated
  const reached = bins.midpoints
    .filter((at) => at >= low && at <= high)
    .reduce((most, at) => Math.max(most, potentialEnergy(potential, at)), 0)
  return Math.min(ENERGIES.most * kT, Math.max(ENERGIES.least * kT, 1.1 * reached))
}

/** The bins of the shown range, neighbours merged until a figure can show them; a merged one takes energies from its middle. */
function mergedBins({ bins, regenerated }: Inversion, low: number, high: number) {
  const inside = Array.from(bins.midpoints.keys()).filter(
    (bin) => bins.midpoints[bin] > low && bins.midpoints[bin] < high,
  )
  const step = Math.max(1, Math.ceil(inside.length / MOST_BINS))
  const groups: number[][] = []
  for (let start = 0; start < inside.length; start += step) groups.push(inside.slice(start, start + step))
  const total = bins.weights.reduce((sum, weight) => sum + weight, 0)
  const sum = (values: Float64Array, group: readonly number[]): number =>
    group.reduce((all, bin) => all + values[bin], 0)
  const middle = (group: readonly number[]): number => group[Math.floor(group.length / 2)]
  return {
    groups,
    edges: [...groups.map(([first]) => bins.edges[first]), bins.edges[inside[inside.length - 1] + 1]],
    measured: groups.map((group) => sum(bins.weights, group) / total),
    regenerated: groups.map((group) => sum(regenerated, group)),
    raw: groups.map((group) => bins.rawEnergies[middle(group)]),
    deviations: bins.deviations && groups.map((group) => bins.deviations![middle(group)]),
  }
}

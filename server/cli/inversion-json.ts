import { type FormFit, parametersInUnits, type ShownParameter } from '../../shared/forms'
import {
  type BlockInefficiency,
  binVolumes,
  type CoordinateKind,
  type Histogram,
} from '../../shared/histogram'
import type { InefficiencySource, Inversion } from '../../shared/inversion'
import type { SeriesInefficiency } from '../../shared/numeric'
import { type Table, tableRows, type TableUnits } from '../../shared/tables'
import { coordinateFromInternal, type CoordinateUnit, energyScale } from '../../shared/units'

/** What `invert --json` prints; coordinates, volumes and energies in the units asked for, null for "no data". */
export interface InversionJson {
  readonly kind: CoordinateKind
  readonly temperature: number
  readonly units: { readonly coordinate: CoordinateUnit; readonly energy: string }
  readonly jacobian: boolean
  readonly input: { readonly name: string; readonly sha256: string }
  readonly independentSamples: number | null
  /** Counts per independent sample. */
  readonly inefficiency: number | null
  /** Who says so; null for a density or a probability. */
  readonly inefficiencySource: InefficiencySource | null
  /** Standard deviation of the inefficiency; null unless it was measured. */
  readonly inefficiencyError: number | null
  /** What blocks or chains say, whichever kind gives more; null without such files. */
  readonly blocks: BlockInefficiency | null
  /** From the order of raw samples, as evidence; null for a histogram. */
  readonly sampleInefficiency: { readonly inefficiency: number; readonly error: number } | null
  /** The analytic form the table follows, in the units asked for; null for the smoothed curve. */
  readonly form: {
    readonly name: string
    readonly formula: string
    readonly parameters: readonly ShownParameter[]
  } | null
  readonly bins: readonly {
    readonly low: number
    readonly high: number
    readonly centroid: number
    readonly count: number | null
    readonly volume: number
    readonly energy: number | null
    readonly error: number | null
  }[]
  readonly table: readonly { readonly coordinate: number; readonly energy: number; readonly force: number }[]
  readonly minimum: { readonly coordinate: number; readonly energy: number }
  readonly smoothing: {
    readonly mode: string
    readonly lambda: number | null
    readonly effectiveDimension: number | null
  }
  readonly warnings: readonly { readonly code: string; readonly message: string }[]
  /** Worth knowing, but no doubt about this result. */
  readonly notes: readonly { readonly code: string; readonly message: string }[]
}

/** What an inversion rests on, and the form in its place. */
export interface InversionEvidence {
  readonly histogram: Histogram
  readonly sampleInefficiency: SeriesInefficiency | null
  readonly form: FormFit | null
  readonly input: { readonly name: string; readonly sha256: string }
}

/** The JSON of an inversion. */
export function inversionJson(
  inversion: Inversion,
  { histogram, sampleInefficiency, form, input }: InversionEvidence,
  table: Table,
  units: TableUnits,
): InversionJson {
  const { kind, temperature, jacobian, bins, independentSamples, inefficiency, minimum } = inversion
  const { mode, lambda, effectiveDimension } = inversion.smoothing
  const energyFactor = energyScale(units.energyUnit, temperature)
  const isCount = histogram.content === 'count'
  const shown = (value: number) => coordinateFromInternal(value, units.coordinateUnit)
  const energy = (value: number | undefined) =>
    value === undefined || Number.isNaN(value) ? null : value * energyFactor
  const volumes = volumesInUnit(kind, bins.edges, jacobian, units.coordinateUnit)
  return {
    kind,
    temperature,
    units: { coordinate: units.coordinateUnit, energy: units.energyUnit },
    jacobian,
    input: { name: input.name, sha256: input.sha256 },
    independentSamples,
    inefficiency: inefficiency && inefficiency.value,
    inefficiencySource: inefficiency && inefficiency.source,
    inefficiencyError: inefficiency && inefficiency.deviation,
    blocks: histogram.blocks ?? null,
    sampleInefficiency: sampleInefficiency && {
      inefficiency: sampleInefficiency.autocorrelation.inefficiency,
      error: sampleInefficiency.autocorrelation.deviation,
    },
    form: form && {
      name: form.form,
      formula: form.formula,
      parameters: parametersInUnits(form, units.coordinateUnit, units.energyUnit),
    },
    bins: Array.from(bins.weights, (weight, bin) => ({
      low: shown(bins.edges[bin]),
      high: shown(bins.edges[bin + 1]),
      centroid: shown(bins.centroids[bin]),
      count: isCount ? weight : null,
      volume: volumes[bin],
      energy: energy(bins.rawEnergies[bin]),
      error: energy(bins.deviations?.[bin]),
    })),
    table: tableRows(table, units),
    minimum: { coordinate: shown(minimum.coordinate), energy: minimum.energy * energyFactor },
    smoothing: { mode, lambda, effectiveDimension },
    warnings: inversion.warnings.map(({ code, message }) => ({ code, message })),
    notes: inversion.notes.map(({ code, message }) => ({ code, message })),
  }
}

/** Volumes with lengths and dihedrals in the unit asked for; that of an angle, cos a − cos b, is a pure number. */
function volumesInUnit(
  kind: CoordinateKind,
  edges: Float64Array,
  jacobian: boolean,
  unit: CoordinateUnit,
): Float64Array {
  const powers: Record<CoordinateKind, number> = { bond: 3, angle: 0, dihedral: 1 }
  const factor = coordinateFromInternal(1, unit) ** (jacobian ? powers[kind] : 1)
  return binVolumes(kind, edges, jacobian).map((volume) => volume * factor)
}

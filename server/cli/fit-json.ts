import {
  type FormRanking,
  type FormRefusal,
  parametersInUnits,
  type RankedFit,
  type ShownParameter,
} from '../../shared/forms'
import type { CoordinateKind } from '../../shared/histogram'
import { coordinateFromInternal, type CoordinateUnit, type EnergyUnit } from '../../shared/units'

/** A fitted form in `fit --json`, in the units asked for. */
export interface FitJson {
  readonly form: string
  readonly terms: number | null
  readonly formula: string
  readonly parameters: readonly ShownParameter[]
  readonly freeParameters: number
  readonly logLikelihood: number | null
  readonly aic: number | null
  readonly deltaAic: number | null
  /** Per degree of freedom it should be about 1. */
  readonly goodness: { readonly chiSquare: number; readonly freedom: number } | null
  /** |ΔU| in kT, and where. */
  readonly largestDeviation: { readonly value: number; readonly coordinate: number } | null
  readonly tried: readonly { readonly terms: number; readonly aic: number | null }[]
}

/** What `fit --json` prints; coordinates and energies in the units asked for, null for "unknown". */
export interface RankingJson {
  readonly kind: CoordinateKind
  readonly temperature: number
  readonly units: { readonly coordinate: CoordinateUnit; readonly energy: EnergyUnit }
  readonly input: { readonly name: string; readonly sha256: string }
  readonly independentSamples: number | null
  readonly inefficiency: number | null
  readonly cutOff: readonly [low: boolean, high: boolean]
  /** By ascending AIC. */
  readonly fits: readonly FitJson[]
  readonly refused: readonly {
    readonly form: string
    readonly terms: number | null
    readonly code: string
    readonly message: string
  }[]
  readonly warnings: readonly { readonly code: string; readonly message: string }[]
}

/** The JSON of a ranking. */
export function rankingJson(
  ranking: FormRanking,
  units: { readonly coordinate: CoordinateUnit; readonly energy: EnergyUnit },
  input: { readonly name: string; readonly sha256: string },
  warnings: RankingJson['warnings'],
): RankingJson {
  const { kind, temperature, independentSamples, inefficiency, cutOff, candidates } = ranking
  return {
    kind,
    temperature,
    units,
    input: { name: input.name, sha256: input.sha256 },
    independentSamples,
    inefficiency: inefficiency && inefficiency.value,
    cutOff,
    fits: candidates
      .filter((candidate): candidate is RankedFit => candidate.outcome === 'fitted')
      .map((fit) => fitJson(fit, units)),
    refused: candidates
      .filter((candidate): candidate is FormRefusal => candidate.outcome === 'refused')
      .map(({ form, terms, code, message }) => ({ form, terms, code, message })),
    warnings: warnings.map(({ code, message }) => ({ code, message })),
  }
}

function fitJson(fit: RankedFit, units: RankingJson['units']): FitJson {
  const { form, terms, formula, freeParameters, logLikelihood, aic, deltaAic, goodness, tried } = fit
  const largest = fit.largestDeviation
  return {
    form,
    terms,
    formula,
    parameters: parametersInUnits(fit, units.coordinate, units.energy),
    freeParameters,
    logLikelihood,
    aic,
    deltaAic,
    goodness,
    largestDeviation: largest && {
      value: largest.value,
      coordinate: coordinateFromInternal(largest.coordinate, units.coordinate),
    },
    tried,
  }
}

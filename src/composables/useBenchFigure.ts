import { computed, reactive, type ComputedRef } from 'vue'
import { useMediaQuery } from '@vueuse/core'
import type { Histogram } from '@shared/histogram'
import { coordinateFromInternal, type CoordinateKind } from '@shared/units'
import { coordinateUnitOf, type DisplayUnits } from '@/components/figure/coordinate-names'
import { basinSigns, type BasinSign } from '@/components/bench/figure/basin-signs'
import { emptyAxes } from '@/components/bench/figure/empty-axes'
import {
  axesOf,
  figureModel,
  type FigureAxes,
  type FigureModel,
} from '@/components/bench/figure/figure-model'
import type { CurveName, VisibleCurves } from '@/components/bench/figure/visible-curves'
import { edgeDecimals, readingAt, type Reading } from '@/components/bench/figure/reading'
import { warningPlaces } from '@/components/bench/warning-titles'
import type { InversionAnswer } from '@/workers'
import { useSteady } from './useSteady'

/** What the figure and the row under it show. */
export interface BenchFigureState {
  readonly model: ComputedRef<FigureModel | null>
  /** Those of the model, or the usual ones of the kind while there is none. */
  readonly axes: ComputedRef<FigureAxes>
  readonly reading: ComputedRef<Reading | null>
  /** Decimals of bin edges; a coordinate between them has one more. */
  readonly decimals: ComputedRef<number>
  /** Width of the bins, null where they differ. */
  readonly binWidth: ComputedRef<number | null>
  /** Basins of the smooth curve, from left to right. */
  readonly basins: ComputedRef<BasinSign[]>
  /** Where warnings point at the axis, in the unit shown. */
  readonly wedges: ComputedRef<number[]>
  readonly visible: VisibleCurves
  readonly toggle: (curve: CurveName) => void
}

/** What the figure is made from. */
export interface FigureSource {
  readonly kind: () => CoordinateKind
  readonly temperature: () => number
  readonly histogram: () => Histogram | null
  readonly answer: () => InversionAnswer | null
  readonly bin: () => number | null
  readonly units: DisplayUnits
}

/** Turns an inversion into what the figure draws, in the units a person reads. */
export function useBenchFigure(source: FigureSource): BenchFigureState {
  const { units } = source
  const visible = reactive({
    measured: true,
    regenerated: true,
    // On a phone the panels need the height: there the key brings it.
    residual: useMediaQuery('(min-width: 600px)').value,
    potential: true,
    smooth: true,
    rings: true,
    comparison: true,
  })
  const chosenUnits = computed<DisplayUnits>(() => ({ ...units }))
  const inversion = computed(() => source.answer()?.inversion ?? null)
  const model = computed(() => {
    const answer = source.answer()
    if (answer === null) return null
    return figureModel(answer.inversion, chosenUnits.value, answer.form === null ? null : answer)
  })
  const unit = computed(() => coordinateUnitOf(source.kind(), units))
  const edges = computed(
    () => source.histogram()?.edges.map((edge) => coordinateFromInternal(edge, unit.value)) ?? null,
  )

  return {
    model,
    axes: useSteady(() =>
      model.value === null
        ? emptyAxes(source.kind(), chosenUnits.value, source.temperature())
        : axesOf(model.value),
    ),
    reading: computed(() => {
      const [histogram, bin] = [source.histogram(), source.bin()]
      if (histogram === null || bin === null || inversion.value === null || model.value === null) return null
      return readingAt(histogram, inversion.value, model.value, chosenUnits.value, bin)
    }),
    decimals: computed(() => (edges.value === null ? 0 : edgeDecimals(edges.value))),
    binWidth: computed(() => edges.value && evenWidth(edges.value)),
    basins: useSteady(() => {
      const answer = source.answer()
      return answer === null || model.value === null ? [] : basinSigns(answer.basins, unit.value, model.value)
    }),
    wedges: useSteady(() => {
      const histogram = source.histogram()
      if (histogram === null || inversion.value === null) return []
      return warningPlaces(inversion.value.warnings, histogram.edges, histogram.weights).map((place) =>
        coordinateFromInternal(place, unit.value),
      )
    }),
    visible,
    toggle: (curve) => {
      visible[curve] = !visible[curve]
    },
  }
}

/** The common width of bins, null where they differ by more than rounding of a text file. */
function evenWidth(edges: Float64Array): number | null {
  const mean = (edges[edges.length - 1] - edges[0]) / (edges.length - 1)
  const even = edges.every(
    (edge, index) => index === 0 || Math.abs(edge - edges[index - 1] - mean) < 0.01 * mean,
  )
  return even ? mean : null
}

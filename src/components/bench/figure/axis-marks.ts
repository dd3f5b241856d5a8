import { axisTicks, type AxisTicks } from '@/components/figure/axis-ticks'
import { linearScale, type LinearScale } from '@/components/figure/linear-scale'
import { fixedText } from '@/components/figure/number-text'
import type { FigureFrame, Panel } from './figure-frame'
import type { FigureAxes } from './figure-model'
import { RESIDUAL_LIMIT, RESIDUAL_LINES } from './residual-stems'

/** A tick at a pixel, with its label where it has one. */
export interface Mark {
  readonly at: number
  readonly label: string | null
}

/** All ticks of the figure in pixels, and the scales they were made with. */
export interface AxisMarks {
  readonly x: LinearScale
  readonly density: LinearScale
  readonly energy: LinearScale
  /** In errors; null while the residual is not shown. */
  readonly residual: LinearScale | null
  readonly spine: { readonly major: readonly Mark[]; readonly minor: readonly Mark[] }
  readonly densityTicks: readonly Mark[]
  readonly energyTicks: readonly Mark[]
  readonly secondTicks: readonly Mark[]
  readonly residualTicks: readonly Mark[]
}

/** Height at the head of an axis that belongs to its quantity and unit. */
const HEAD = 33
const SPINE_LABEL_EVERY = { wide: 75, narrow: 46 } as const
/** Room in the left end of a narrow spine that the coordinate's name takes. */
const NARROW_NAME = 14

/** Places every tick of the figure. */
export function axisMarks(frame: FigureFrame, axes: FigureAxes): AxisMarks {
  const { distribution, potential } = frame
  const x = linearScale(axes.domain, [distribution.left, distribution.left + distribution.width])
  const density = vertical([0, axes.densityTop], distribution)
  const energy = vertical(axes.energyDomain, potential)
  const residual = frame.residual && vertical([-RESIDUAL_LIMIT, RESIDUAL_LIMIT], frame.residual)
  const second = vertical(
    [axes.energyDomain[0] * axes.secondEnergy.perUnit, axes.energyDomain[1] * axes.secondEnergy.perUnit],
    potential,
  )
  const every = frame.narrow ? SPINE_LABEL_EVERY.narrow : SPINE_LABEL_EVERY.wide
  const spine = axisTicks(...axes.domain, Math.floor(distribution.width / every), axes.degrees)
  return {
    x,
    density,
    energy,
    residual,
    spine: {
      major: spine.major.map((value) => {
        const at = x.at(value)
        const free = !frame.narrow || at - distribution.left > NARROW_NAME
        return { at, label: free ? fixedText(value, spine.decimals) : null }
      }),
      minor: spine.minor.map((value) => ({ at: x.at(value), label: null })),
    },
    densityTicks: headFree(distribution, density, valueTicks(density, 36)).map((mark, index) =>
      index === 0 ? { ...mark, label: null } : mark,
    ),
    energyTicks: headFree(potential, energy, valueTicks(energy, 38)),
    secondTicks: headFree(potential, second, valueTicks(second, 26), 22),
    residualTicks:
      residual === null
        ? []
        : RESIDUAL_LINES.map((line) => ({ at: residual.at(line), label: fixedText(line) })),
  }
}

const vertical = (domain: readonly [number, number], panel: Panel): LinearScale =>
  linearScale(domain, [panel.top + panel.height, panel.top])

const valueTicks = (scale: LinearScale, every: number): AxisTicks =>
  axisTicks(
    scale.domain[0],
    scale.domain[1],
    Math.max(2, Math.round((scale.range[0] - scale.range[1]) / every)),
  )

/** Labelled ticks from zero up, except where the head of the axis stands. */
function headFree(panel: Panel, scale: LinearScale, ticks: AxisTicks, head = HEAD): Mark[] {
  return ticks.major
    .filter((value) => value >= 0)
    .map((value) => ({ at: scale.at(value), label: fixedText(value, ticks.decimals) }))
    .filter(({ at }) => at - panel.top >= head)
}

import { basinsAtDepth, type BasinCurve } from '@shared/basins'
import { linearScale } from '@/components/figure/linear-scale'

/** Pixels of the short curve: number of basins against depth. */
export const STEPS = { width: 272, height: 92, left: 20, right: 8, top: 8, bottom: 30 } as const
/** Shallower wells are noise on any curve; without a limit their number would hide the others. */
const MOST_COUNT = 6
const LEAST_RANGE = 2

/** The curve as a path, with its scales. Depth in kT, from 0 to a little beyond the deepest counted well. */
export function basinSteps(curve: BasinCurve, depth: number) {
  const { width, height, left, right, top, bottom } = STEPS
  const deepest = curve.steps[0]?.depth ?? 0
  const most = Math.min(10, Math.max(LEAST_RANGE, 1.2 * deepest, 1.2 * depth))
  const x = linearScale([0, most], [left, width - right])
  const count = Math.min(MOST_COUNT, Math.max(2, ...curve.steps.map((step) => step.count)))
  const y = linearScale([0, count], [height - bottom, top])
  const inside = curve.steps.filter((step) => step.depth < most)
  const level = (value: number): number => y.at(Math.min(count, value))
  const start = `M${fixed(x.at(most))} ${fixed(level(basinsAtDepth(curve, most)))}`
  const path = inside.map((step) => `H${fixed(x.at(step.depth))}V${fixed(level(step.count))}`).join('')
  return { x, y, most, count, path: `${start}${path}H${left}` }
}

const fixed = (pixel: number): number => Math.round(pixel * 100) / 100

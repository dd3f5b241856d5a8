import { fixedText, significantText } from '@/components/figure/number-text'
import type { Point } from '@/components/figure/stepped-outline'
import type { FigureModel } from './figure-model'

const ROWS = 36

/** The figure in a sentence, for those who do not see it. */
export function figureSummary(termName: string, model: FigureModel): string {
  const { names, kind, energyUnit, potential } = model
  const least = potential.reduce((low, point) => (point[1] < low[1] ? point : low))
  const most = potential.reduce((high, point) => (point[1] > high[1] ? point : high))
  const at = ([coordinate]: Point): string => coordinateText(coordinate, model) + names.valueSuffix
  const from = at(potential[0])
  const to = at(potential[potential.length - 1])
  return (
    `Distribution of the ${kind} ${termName} and its potential. Data from ${from} to ${to}; the potential is lowest at ` +
    `${at(least)} and rises to ${significantText(most[1], 3)} ${energyUnit} at ${at(most)} within the data.`
  )
}

/** A few evenly spread points of the potential as text, for a table beside the figure. */
export function figureRows(model: FigureModel): { coordinate: string; energy: string }[] {
  const { potential } = model
  const last = potential.length - 1
  return Array.from({ length: ROWS + 1 }, (_, row) => potential[Math.round((row / ROWS) * last)]).map(
    ([coordinate, energy]) => ({
      coordinate: coordinateText(coordinate, model),
      energy: significantText(energy, 3),
    }),
  )
}

function coordinateText(coordinate: number, { degrees }: FigureModel): string {
  return fixedText(coordinate, degrees ? 1 : 3)
}

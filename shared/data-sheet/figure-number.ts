/** A number of a figure, to the five digits that a drawing can show. */
export function figureNumber(value: number): number {
  return Number(value.toPrecision(5)) + 0
}

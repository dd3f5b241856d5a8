/**
 * Natural order of two names: letters by code unit, runs of digits by value, so that S2 comes before S10. The same on every
 * machine, whatever its language.
 *
 * @returns negative, zero or positive as for Array.prototype.sort; zero only for equal names
 * @example ['S10', 'S2', 'B'].sort(compareTypes) // ['B', 'S2', 'S10']
 */
export function compareTypes(a: string, b: string): number {
  const [left, right] = [pieces(a), pieces(b)]
  for (let i = 0; i < Math.min(left.length, right.length); i++) {
    const [x, y] = [left[i], right[i]]
    if (x === y) continue
    const bothNumbers = /^\d/.test(x) && /^\d/.test(y)
    if (bothNumbers && Number(x) !== Number(y)) return Number(x) - Number(y)
    return x < y ? -1 : 1
  }
  return left.length - right.length
}

/**
 * Order of two sequences of names: the first that differs decides, then the length.
 *
 * @returns as `compareTypes`
 */
export function compareTypeSequences(a: readonly string[], b: readonly string[]): number {
  for (let i = 0; i < Math.min(a.length, b.length); i++) {
    const order = compareTypes(a[i], b[i])
    if (order !== 0) return order
  }
  return a.length - b.length
}

function pieces(name: string): string[] {
  return name.match(/\d+|\D+/g) ?? []
}

/**
 * Many rings as the data of one path: far cheaper to redraw under a moving slider than an element for each.
 *
 * @param centres in pixels
 */
export function ringPath(centres: readonly (readonly number[])[], radius: number): string {
  const across = fixed(2 * radius)
  const arc = `a${radius} ${radius} 0 1 0`
  return centres
    .map(([x, y]) => `M${fixed(x - radius)} ${fixed(y)}${arc} ${across} 0${arc} ${-across} 0z`)
    .join('')
}

const fixed = (pixel: number): number => Math.round(pixel * 100) / 100

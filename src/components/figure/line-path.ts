import type { LinearScale } from './linear-scale'
import type { Point } from './stepped-outline'
import { svgNumber } from '@shared/picture'

/** Points in data coordinates as the data of an open path in pixels. */
export function linePath(points: readonly Point[], x: LinearScale, y: LinearScale): string {
  return points
    .map(
      ([across, up], index) => `${index === 0 ? 'M' : 'L'}${svgNumber(x.at(across))} ${svgNumber(y.at(up))}`,
    )
    .join('')
}

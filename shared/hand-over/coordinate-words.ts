import { placeWords } from '../inversion'
import type { CoordinateKind } from '../units'

/** A place on one or two axes for a sentence, as in 0.464 nm, 153°. */
export function placesWords(kinds: readonly CoordinateKind[], coordinates: readonly number[]): string {
  return coordinates
    .map((coordinate, axis) => placeWords(kinds[axis], coordinate).replace('-', '−'))
    .join(', ')
}

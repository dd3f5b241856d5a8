import { type CoordinateKind, coordinateFromInternal } from '../units'

/** A place on the axis for a sentence: nm to four digits, degrees to a tenth. */
export function placeWords(kind: CoordinateKind, coordinate: number): string {
  if (kind === 'bond') return `${Number(coordinate.toPrecision(4))} nm`
  return `${Number(coordinateFromInternal(coordinate, 'degree').toFixed(1))}°`
}

/** A length on the axis for a sentence, to three digits. */
export function extentWords(kind: CoordinateKind, length: number): string {
  if (kind === 'bond') return `${Number(length.toPrecision(3))} nm`
  return `${Number(coordinateFromInternal(length, 'degree').toPrecision(3))}°`
}

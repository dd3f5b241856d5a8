import { InvalidInputError } from '../errors'

/**
 * Abridged standard atomic weights 2021 in g/mol, for every element that has one and that polymers are made of or carry.
 *
 * Source: T. Prohaska et al., Standard atomic weights of the elements 2021 (IUPAC Technical Report), Pure Appl. Chem. 94
 * (2022) 573–600, table of abridged values.
 */
const ATOMIC_WEIGHTS: Readonly<Record<string, number>> = {
  H: 1.008,
  He: 4.0026,
  Li: 6.94,
  Be: 9.0122,
  B: 10.81,
  C: 12.011,
  N: 14.007,
  O: 15.999,
  F: 18.998,
  Ne: 20.18,
  Na: 22.99,
  Mg: 24.305,
  Al: 26.982,
  Si: 28.085,
  P: 30.974,
  S: 32.06,
  Cl: 35.45,
  Ar: 39.95,
  K: 39.098,
  Ca: 40.078,
  Sc: 44.956,
  Ti: 47.867,
  V: 50.942,
  Cr: 51.996,
  Mn: 54.938,
  Fe: 55.845,
  Co: 58.933,
  Ni: 58.693,
  Cu: 63.546,
  Zn: 65.38,
  Ga: 69.723,
  Ge: 72.63,
  As: 74.922,
  Se: 78.971,
  Br: 79.904,
  Kr: 83.798,
  Rb: 85.468,
  Sr: 87.62,
  Y: 88.906,
  Zr: 91.224,
  Nb: 92.906,
  Mo: 95.95,
  Ru: 101.07,
  Rh: 102.91,
  Pd: 106.42,
  Ag: 107.87,
  Cd: 112.41,
  In: 114.82,
  Sn: 118.71,
  Sb: 121.76,
  Te: 127.6,
  I: 126.9,
  Xe: 131.29,
  Cs: 132.91,
  Ba: 137.33,
  Pt: 195.08,
  Au: 196.97,
  Hg: 200.59,
  Tl: 204.38,
  Pb: 207.2,
  Bi: 208.98,
}

/**
 * Whether a symbol stands in the table.
 *
 * @param element symbol as in the periodic table, such as Cl
 */
export function isKnownElement(element: string): boolean {
  return Object.hasOwn(ATOMIC_WEIGHTS, element)
}

/**
 * The abridged standard atomic weight (IUPAC 2021) of an element.
 *
 * @param element symbol as in the periodic table, such as Cl
 * @returns g/mol
 * @throws {InvalidInputError} ELEMENT_UNKNOWN for anything without a standard atomic weight in the table
 * @example atomicWeight('C') // 12.011
 */
export function atomicWeight(element: string): number {
  const weight = isKnownElement(element) ? ATOMIC_WEIGHTS[element] : undefined
  if (weight === undefined) {
    throw new InvalidInputError('ELEMENT_UNKNOWN', `No standard atomic weight is known for “${element}”.`)
  }
  return weight
}

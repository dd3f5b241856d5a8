import { InvalidInputError, type InvalidInputCode } from '../errors'
import { isKnownElement } from './atomic-weights'
import type { SmilesAtom } from './smiles-graph'

const ORGANIC = /^(Cl|Br|[BCNOPSFI])/
const AROMATIC_ORGANIC = /^[bcnops]/
const BRACKET =
  /^\[(\d+)?(\*|[A-Z][a-z]?|se|as|te|[bcnops])(@{1,2}(?:[A-Z]{2}\d+)?)?(H\d?)?([^\]:]*)?(:\d+)?\]$/
const CHARGE = /^(\++|-+|[+-]\d{1,2})?$/

/** A refusal that says where in the text; people count characters from 1, `place.position` from 0. */
export function smilesError(
  code: InvalidInputCode,
  position: number,
  sentence: (where: string) => string,
): InvalidInputError {
  return new InvalidInputError(code, sentence(`at character ${position + 1}`), {
    field: 'smiles',
    position,
  })
}

/**
 * Reads the atom that begins at a position.
 *
 * @returns the atom, or null where no atom begins
 * @throws {InvalidInputError} SMILES_UNPARSABLE for a bracket that makes no sense or an isotope label, ELEMENT_UNKNOWN
 */
export function scanAtom(smiles: string, start: number): SmilesAtom | null {
  if (smiles[start] === '[') return scanBracket(smiles, start)
  const rest = smiles.slice(start)
  const organic = ORGANIC.exec(rest) ?? AROMATIC_ORGANIC.exec(rest)
  const symbol = organic?.[0] ?? (rest.startsWith('*') ? '*' : null)
  if (symbol === null) return null
  return {
    ...named(symbol),
    bracket: false,
    isotope: null,
    hydrogens: 0,
    charge: 0,
    start,
    end: start + symbol.length,
  }
}

function scanBracket(smiles: string, start: number): SmilesAtom {
  const close = smiles.indexOf(']', start)
  if (close < 0) {
    throw smilesError('SMILES_UNPARSABLE', start, (where) => `The bracket opened ${where} is never closed.`)
  }
  const text = smiles.slice(start, close + 1)
  const match = BRACKET.exec(text)
  const [, isotope, symbol = '', , hydrogens, charge = ''] = match ?? []
  if (!match || !CHARGE.test(charge)) {
    throw smilesError(
      'SMILES_UNPARSABLE',
      start,
      (where) => `“${text}” ${where} cannot be read as an atom: element, hydrogens, charge, in this order.`,
    )
  }
  const { element, aromatic } = named(symbol)
  if (element !== '*' && !isKnownElement(element)) {
    throw smilesError(
      'ELEMENT_UNKNOWN',
      start,
      (where) => `“${element}” ${where} is no element with a standard atomic weight.`,
    )
  }
  if (isotope !== undefined && element !== '*') {
    throw smilesError(
      'SMILES_UNPARSABLE',
      start,
      (where) =>
        `“${text}” ${where} carries an isotope label. Masses are standard atomic weights: write the atom without it.`,
    )
  }
  return {
    element,
    aromatic,
    bracket: true,
    isotope: isotope === undefined ? null : Number(isotope),
    hydrogens: hydrogens === undefined ? 0 : Number(hydrogens.slice(1) || '1'),
    charge: chargeValue(charge),
    start,
    end: close + 1,
  }
}

function named(symbol: string): Pick<SmilesAtom, 'element' | 'aromatic'> {
  const aromatic = /^[a-z]/.test(symbol)
  return { element: aromatic ? symbol[0].toUpperCase() + symbol.slice(1) : symbol, aromatic }
}

/** '', '+', '++', '-2' → 0, 1, 2, −2. */
function chargeValue(text: string): number {
  if (text === '') return 0
  const sign = text.startsWith('-') ? -1 : 1
  return sign * (/\d/.test(text) ? Number(text.slice(1)) : text.length)
}

import { scanAtom, smilesError } from './scan-atom'
import type { SmilesAtom, SmilesBond, SmilesGraph } from './smiles-graph'

const BOND_SYMBOLS = '-=#:/\\'

interface OpenRing {
  readonly atom: number
  readonly symbol: string
  readonly position: number
}

/** What the scanner holds between two characters. */
interface Scan {
  readonly atoms: SmilesAtom[]
  readonly bonds: SmilesBond[]
  readonly openRings: Map<string, OpenRing>
  readonly branches: { atom: number; position: number }[]
  /** The atom the next one is bonded to; null at the beginning and after a dot. */
  previous: number | null
  symbol: string
  symbolPosition: number
}

/**
 * Reads a SMILES (OpenSMILES: atoms, bonds, branches, ring closures, dots) into a graph that remembers where each atom
 * stands in the text, so that later checks can say where. Stereo marks are accepted and dropped. Not checked here:
 * valences and whether aromatic rings can be.
 *
 * @param smiles one line without blanks
 * @returns atoms in the order of the text, bonds by atom index
 * @throws {InvalidInputError} SMILES_UNPARSABLE or ELEMENT_UNKNOWN with `place.position`
 * @example scanSmiles('*CC*').bonds.length // 3
 */
export function scanSmiles(smiles: string): SmilesGraph {
  const scan: Scan = {
    atoms: [],
    bonds: [],
    openRings: new Map(),
    branches: [],
    previous: null,
    symbol: '',
    symbolPosition: -1,
  }
  let position = 0
  while (position < smiles.length) position = step(scan, smiles, position)
  finish(scan, smiles)
  return { atoms: scan.atoms, bonds: scan.bonds }
}

/** Reads one sign; returns the position after it. */
function step(scan: Scan, smiles: string, position: number): number {
  const atom = scanAtom(smiles, position)
  if (atom) {
    scan.atoms.push(atom)
    const index = scan.atoms.length - 1
    if (scan.previous !== null) addBond(scan, scan.previous, index, scan.symbol, position)
    scan.previous = index
    scan.symbol = ''
    return atom.end
  }
  const sign = smiles[position]
  const ring = /^(?:\d|%\d\d|%\(\d{1,5}\))/.exec(smiles.slice(position))?.[0]
  const misplaced = scan.previous === null || (scan.symbol !== '' && ring === undefined)
  if (misplaced || !(ring ?? BOND_SYMBOLS + '().').includes(sign)) throw unexpected(sign, position)
  if (ring !== undefined) {
    closeRing(scan, ring.replace(/[%()]/g, '').replace(/^0+(?=\d)/, ''), position)
    return position + ring.length
  }
  if (sign === '(') {
    scan.branches.push({ atom: scan.previous as number, position })
    if (smiles[position + 1] === ')') throw unexpected(')', position + 1)
  } else if (sign === ')') {
    const branch = scan.branches.pop()
    if (!branch) {
      throw smilesError(
        'SMILES_UNPARSABLE',
        position,
        (where) => `The parenthesis closed ${where} was never opened.`,
      )
    }
    scan.previous = branch.atom
  } else if (sign === '.') {
    scan.previous = null
  } else {
    scan.symbol = sign
    scan.symbolPosition = position
  }
  return position + 1
}

function closeRing(scan: Scan, number: string, position: number): void {
  const atom = scan.previous as number
  const open = scan.openRings.get(number)
  if (!open) {
    scan.openRings.set(number, { atom, symbol: scan.symbol, position })
  } else {
    const plain = (symbol: string): string => (symbol === '/' || symbol === '\\' ? '' : symbol)
    const [first, second] = [plain(open.symbol), plain(scan.symbol)]
    if (first !== '' && second !== '' && first !== second) {
      throw smilesError(
        'SMILES_UNPARSABLE',
        position,
        (where) => `Ring closure ${number} ${where} names another bond than where it was opened.`,
      )
    }
    if (open.atom === atom) throw unexpected(number, position)
    addBond(scan, open.atom, atom, first || second, position)
    scan.openRings.delete(number)
  }
  scan.symbol = ''
}

function addBond(scan: Scan, from: number, to: number, symbol: string, position: number): void {
  if (
    scan.bonds.some(
      (bond) => (bond.from === from && bond.to === to) || (bond.from === to && bond.to === from),
    )
  ) {
    throw smilesError(
      'SMILES_UNPARSABLE',
      position,
      (where) => `The ring closure ${where} bonds two atoms that are bonded already.`,
    )
  }
  scan.bonds.push({ from, to, symbol, position })
}

function finish(scan: Scan, smiles: string): void {
  const branch = scan.branches.at(-1)
  if (branch) {
    throw smilesError(
      'SMILES_UNPARSABLE',
      branch.position,
      (where) => `The parenthesis opened ${where} is never closed.`,
    )
  }
  for (const [number, open] of scan.openRings) {
    throw smilesError(
      'SMILES_UNPARSABLE',
      open.position,
      (where) => `Ring ${number}, opened ${where}, is never closed.`,
    )
  }
  if (scan.symbol !== '') throw unexpected(scan.symbol, scan.symbolPosition)
  if (scan.previous === null && smiles.length > 0) throw unexpected('.', smiles.length - 1)
}

function unexpected(sign: string, position: number): Error {
  return smilesError(
    'SMILES_UNPARSABLE',
    position,
    (where) => `“${sign}” ${where} does not belong there. Nothing after it was read.`,
  )
}

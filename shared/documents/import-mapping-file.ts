import { type ChainMatch, matchChains, parseRepeatUnit, type RepeatUnit, smilesOrder } from '../chemistry'
import { InvalidInputError } from '../errors'
import type { MappingDocument } from '../mapping'
import { beadsOnChain } from './beads-on-chain'
import { choicesOnChain } from './choices-on-chain'
import { filePath, type MappingFileError } from './mapping-file-error'
import type { MappingFile } from './mapping-file-schema'

/** A mapping file as a mapping of a repeat unit, or everything that is wrong with it. */
export type MappingImport =
  | {
      readonly ok: true
      readonly name: string
      readonly unit: RepeatUnit
      readonly document: MappingDocument
      /** Whether atoms were matched because the two SMILES are written differently. */
      readonly matched: boolean
      /** What a person should know about the import. */
      readonly notes: readonly string[]
    }
  | { readonly ok: false; readonly errors: readonly MappingFileError[] }

/**
 * Takes a mapping file over to a repeat unit. Where the SMILES of the file is written differently but stands for the same
 * chain, atoms are matched by the graph of the chain (`matchChains`), also when it is written from the other end or parted at
 * another bond; beads may reach across the border then.
 *
 * @param file as `readMappingFile` gives it
 * @param target the repeat unit to map; the file's own when left out
 */
export async function importMappingFile(file: MappingFile, target?: RepeatUnit): Promise<MappingImport> {
  let own: RepeatUnit
  try {
    own = await parseRepeatUnit(file.smiles)
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    return { ok: false, errors: [{ code: error.code, message: error.message, path: 'smiles' }] }
  }
  const errors = atomErrors(file, smilesOrder(own))
  if (errors.length > 0) return { ok: false, errors }
  const unit = target ?? own
  const matched = own.smiles !== unit.smiles
  const match = matched ? matchChains(own, unit) : sameAtoms(own)
  if (!match) return { ok: false, errors: [otherChain(own, unit)] }
  const placed = beadsOnChain(file, own, match)
  if (!placed.ok) return placed
  const { choices, errors: lost } = choicesOnChain(file, unit, placed, match)
  if (lost.length > 0) return { ok: false, errors: lost }
  const document: MappingDocument = {
    version: 1,
    beads: placed.beads,
    ...(file.poolings && { poolings: file.poolings }),
    ...(choices.length > 0 && { termChoices: choices }),
  }
  const notes = matched ? [matchNote(own, unit, match)] : []
  return { ok: true, name: file.name ?? '', unit, document, matched, notes }
}

function sameAtoms(unit: RepeatUnit): ChainMatch {
  return { atoms: unit.atoms.map(({ index }) => ({ atom: index, shift: 0 })), direction: 1 }
}

function atomErrors(file: MappingFile, order: readonly (number | null)[]): MappingFileError[] {
  const check = (atom: number, path: string): MappingFileError[] => {
    if (atom >= order.length) {
      const message = `There is no atom ${atom}: the SMILES names ${order.length} heavy atoms and *, counted from 0.`
      return [{ code: 'ATOM_UNKNOWN', message, path }]
    }
    if (order[atom] !== null) return []
    const message = `Atom ${atom} is a *, which stands for the neighbouring unit and belongs to no bead.`
    return [{ code: 'ATOM_IS_ATTACHMENT', message, path }]
  }
  return file.beads.flatMap(({ name, site, atoms }, bead) => [
    ...(site.rule === 'atom' ? check(site.atom, filePath(['beads', bead, 'site', 'atom'])) : []),
    ...atoms.flatMap(({ atom, offset }, index) => {
      const path = filePath(['beads', bead, 'atoms', index, 'atom'])
      const first = atoms.findIndex((other) => other.atom === atom && other.offset === offset)
      const message = `Bead ${name} names atom ${atom} twice; give it one weight.`
      return first < index ? [{ code: 'ATOM_TWICE' as const, message, path }] : check(atom, path)
    }),
  ])
}

function otherChain(own: RepeatUnit, unit: RepeatUnit): MappingFileError {
  const difference =
    own.formula === unit.formula
      ? `both units are ${unit.formula}, but they are bonded differently`
      : `its unit is ${own.formula}, this one is ${unit.formula}`
  return {
    code: 'CHAIN_DIFFERS',
    message: `The file maps another chain: ${difference}. Only the mapping of the same repeat unit can be taken over, however its SMILES is written.`,
    path: 'smiles',
  }
}

function matchNote(own: RepeatUnit, unit: RepeatUnit, { atoms, direction }: ChainMatch): string {
  const end = direction === -1 ? ', from the other end' : ''
  const border = new Set(atoms.map(({ shift }) => shift)).size > 1 ? ', with its border elsewhere' : ''
  return `The file writes the same chain as ${own.smiles} instead of ${unit.smiles}${end}${border}. Its atoms were matched by the graph of the chain.`
}

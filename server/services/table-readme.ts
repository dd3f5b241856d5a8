import { DEFAULT_BUILT_IN, layoutSentences } from '../../shared/layouts'
import { choiceOf, type MappingDocument } from '../../shared/mapping'
import { formatNumber } from '../../shared/tables'
import { unitWord } from '../../shared/units'
import type { Term } from '../entities/term.entity'
import { builtInName, type FoundLayout } from './find-layout'
import { statePointText, type TableFileUnits, type TableSource } from './table-file'

/** What the README of an archive tells. */
export interface ReadmeInput {
  readonly source: Pick<TableSource, 'polymer' | 'mapping' | 'statePoint' | 'invented'>
  /** The name of a term among those of the mapping. */
  readonly nameOf: (term: Term) => string
  readonly units: TableFileUnits
  readonly layout: FoundLayout
  readonly files: readonly { readonly name: string; readonly term: Term; readonly warnings: number }[]
  /** Tables of two terms together. */
  readonly joint: readonly {
    readonly name: string
    readonly terms: readonly [Term, Term]
    readonly warnings: number
  }[]
  /** Terms without a table, and why. */
  readonly missing: readonly { readonly term: Term; readonly reason: string }[]
  /** Terms that the mapping leaves out of the set, and why. */
  readonly leftOut: readonly { readonly term: Term; readonly reason: string }[]
  /** Pairs that a joint potential was decided for, but whose data give none, and why. */
  readonly jointMissing: readonly { readonly terms: readonly [Term, Term]; readonly reason: string }[]
}

/** The text that lies beside the tables of an archive and explains them to whoever did not make them. */
export function writeReadme(input: ReadmeInput): string {
  const { source, nameOf, files, joint, missing } = input
  const { polymer, mapping, statePoint } = source
  const rest = statePointText(statePoint)
  return [
    `Tables of bonded potentials: ${polymer.name}, mapping ${mapping.name}`,
    '',
    ...(source.invented ? ['INVENTED data: made up for demonstration, not for use.', ''] : []),
    `Repeat unit   ${polymer.smiles} (${polymer.formula}, ${formatNumber(polymer.mass)} g/mol)`,
    `Mapping       ${mapping.name}, revision ${mapping.revision}, ${mapping.document.beads.length} beads per repeat unit`,
    `State point   ${formatNumber(statePoint.temperature)} K${rest === null ? '' : `, ${rest}`}`,
    '',
    'Files',
    ...files.map(
      ({ name, term, warnings }) => `  ${name}\n    ${term.kind} ${nameOf(term)}${warningCount(warnings)}`,
    ),
    ...joint.map(
      ({ name, terms: [x, y], warnings }) =>
        `  ${name}\n    joint potential of ${x.kind} ${nameOf(x)} (x) with ${y.kind} ${nameOf(y)} (y); it takes the place of both${warningCount(warnings)}`,
    ),
    '',
    ...(missing.length > 0
      ? [
          'Terms of the mapping without a table',
          ...missing.map(({ term, reason }) => `  ${term.kind} ${nameOf(term)}: ${reason}`),
          '',
        ]
      : [`Every term ${input.leftOut.length > 0 ? 'in use' : 'of the mapping'} has a table.`, '']),
    ...(input.leftOut.length > 0
      ? [
          'Terms left out of the set, since others describe the same motion',
          ...input.leftOut.map(({ term, reason }) => `  ${term.kind} ${nameOf(term)}: ${reason}`),
          '',
        ]
      : []),
    ...input.jointMissing.flatMap(({ terms: [x, y], reason }) => [
      `A joint potential was decided for ${x.kind} ${nameOf(x)} with ${y.kind} ${nameOf(y)}, but there is no table:`,
      `  ${reason}`,
      '',
    ]),
    ...(files.some(({ term }) => term.placeKey !== '')
      ? [
          'Terms with a number',
          '  The beads of such a term follow one another at several places of the repeat unit whose surroundings differ: (1), (2) and so',
          '  on are one place each, place1, place2 in the names of files. The bead order in each file says which place it is.',
          '',
        ]
      : []),
    ...columnLines(input),
    ...(usesKT(input)
      ? [`  kT is taken at ${formatNumber(statePoint.temperature)} K, the temperature of the state point.`]
      : []),
    '',
    'What they are good for',
    '  Each table is a Boltzmann inversion of one measured distribution, divided by the Jacobian unless its comments say',
    '  otherwise. It is valid at this one state point. Terms that are correlated, and terms that meet at one bead, may count the',
    '  same preference twice: run a chain on the tables and compare its distributions with the measured ones before you rely',
    '  on them.',
    '',
    '  The checksum in each file is the SHA-256 of its rows, without the comment lines.',
    '',
  ].join('\n')
}

/** What the columns are: of the house's own three, or of the layout asked for. */
function columnLines(input: ReadmeInput): string[] {
  const { units, joint, layout } = input
  if (!isHouseLayout(layout)) return layoutLines(input)
  const [length, angle, energy] = [unitWord(units.length), unitWord(units.angle), unitWord(units.energy)]
  return [
    'Columns',
    '  The file of a term has three columns, separated by blanks: coordinate, energy, force. Lines that start with # are comments.',
    ...(joint.length > 0
      ? [
          '  A joint file has five: x, y, energy, and the forces along x and along y. x stays within a block; blocks are parted by',
          '  blank lines. It is the smoothed joint potential at one state point: use it in place of both single tables, not beside',
          '  them, and validate it first.',
        ]
      : []),
    `  A bond is the distance between two beads in ${length}.`,
    `  An angle is the internal angle at the middle bead in ${angle}: ${units.angle === 'degree' ? '180' : 'pi'} is straight.`,
    `  A dihedral is in ${angle}: 0 is cis, ${units.angle === 'degree' ? '180' : 'pi'} is trans, its sign follows the right-hand rule (IUPAC).`,
    `  Energies are in ${energy}; the least energy of each curve is 0.`,
    `  A force is minus the derivative of the energy by the coordinate: in ${energy} per ${length} for a bond, in ${energy} per`,
    `  ${angle} for an angle or a dihedral. Check which angle unit your program expects the force to be per.`,
  ]
}

function layoutLines({ layout: { name, version, document }, files, joint }: ReadmeInput): string[] {
  const kinds = (['bond', 'angle', 'dihedral'] as const).filter(
    (kind) =>
      files.some(({ term }) => term.kind === kind) ||
      joint.some(({ terms }) => terms.some((term) => term.kind === kind)),
  )
  return [
    `Layout: ${name}${version === null ? '' : `, version ${version}`}`,
    ...layoutSentences(document, kinds).map((line) => `  ${line}`),
    ...(joint.length > 0
      ? [
          `  A joint file has ${document.joint.columns.join(', ')}. It is the smoothed joint potential at one state point: use it in place`,
          '  of both single tables, not beside them, and validate it first.',
        ]
      : []),
  ]
}

function isHouseLayout({ name, version }: FoundLayout): boolean {
  return version === null && name === builtInName(DEFAULT_BUILT_IN)
}

function usesKT({ units, layout: { version, document } }: ReadmeInput): boolean {
  if (version === null) return units.energy === 'kT'
  return [document.bond, document.angle, document.dihedral].some(({ energyUnit }) => energyUnit === 'kT')
}

/** Why the mapping leaves a term out, in the words of who did. */
export function leaveOutReason(document: MappingDocument, term: Pick<Term, 'types' | 'placeKey'>): string {
  return choiceOf(document, term)?.reason || 'no reason given'
}

function warningCount(warnings: number): string {
  return warnings > 0 ? `; ${warnings} warning${warnings > 1 ? 's' : ''}, stated in the file` : ''
}

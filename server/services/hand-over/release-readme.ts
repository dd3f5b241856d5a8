import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import { formatNumber } from '../../../shared/tables'
import { unitWord } from '../../../shared/units'
import type { ManifestTable } from './manifest'

/** The text that lies beside the tables and explains them to whoever did not make them. */
export function writeReleaseReadme(frozen: FrozenHandOver, tables: readonly ManifestTable[]): string {
  const { number, title, polymer, mapping, layout } = frozen
  const units = [layout.length, layout.angle, layout.energy].map(unitWord).join(', ')
  return [
    `Hand-over ${number}: ${title}`,
    '',
    ...(frozen.invented ? ['INVENTED data: made up for demonstration, not for use.', ''] : []),
    `Group         ${frozen.group}`,
    `Released      ${day(frozen.releasedAt)}${by(frozen.madeBy, ', made by')}`,
    `Signed off    ${day(frozen.signedOffAt)}${by(frozen.signedOffBy, ' by')}`,
    ...(frozen.replaces === null ? [] : [`Replaces      hand-over ${frozen.replaces}`]),
    `Repeat unit   ${polymer.smiles} (${polymer.formula}, ${formatNumber(polymer.mass)} g/mol), ${polymer.name}`,
    `Mapping       ${mapping.name}, revision ${mapping.revision}, ${mapping.document.beads.length} beads per repeat unit`,
    `State point   ${statePointWords(frozen)}`,
    `Layout        ${layout.name}; units ${units}`,
    '',
    'Tables',
    ...tables.flatMap(({ path, name, kinds, meta }) => [
      `  ${path}`,
      kinds.length === 2
        ? `    joint potential of ${name.replace(' · ', ' (x) with ')} (y); it takes the place of both`
        : `    ${kinds[0]} ${name}`,
      ...meta.warnings.map(({ code, answer }) => `    ${code}${answer === null ? '' : `, kept: ${answer}`}`),
    ]),
    '',
    ...section(
      'Terms without a table',
      frozen.leftOut.map(({ kind, name, reason }) => `${kind} ${name}: ${reason}`),
    ),
    ...section(
      'Before you run',
      frozen.points.map(({ title: about, text }) => `${about}: ${text}`),
    ),
    ...section('Notes', frozen.notes === '' ? [] : [frozen.notes]),
    ...section(
      `Changed since hand-over ${frozen.replaces ?? ''}`,
      frozen.replaces === null ? [] : frozen.differences.map(({ about, text }) => `${about}: ${text}`),
    ),
    'Files',
    '  mapping.json says which atoms make which bead, mapping.svg shows it. manifest.json lists every file with its SHA-256 for',
    '  programs; sha256sum -c SHA256SUMS checks all of them at once. data-sheet.pdf shows the tables with what they rest on, to print',
    '  and to attach; data-sheet.json holds the same for programs.',
    '',
  ].join('\n')
}

/** The state point in a line. */
export function statePointWords({ statePoint }: Pick<FrozenHandOver, 'statePoint'>): string {
  const { temperature, pressure, phase, composition } = statePoint
  const parts = [`${formatNumber(temperature)} K`, pressure === null ? '' : `${formatNumber(pressure)} bar`]
  return [...parts, phase, composition].filter((part) => part !== '').join(', ')
}

function section(title: string, lines: readonly string[]): string[] {
  return lines.length === 0 ? [] : [title, ...lines.map((line) => `  ${line.replace(/\s+/g, ' ')}`), '']
}

const day = (time: string): string => time.slice(0, 10)
const by = (name: string | null, word: string): string => (name === null ? '' : `${word} ${name}`)

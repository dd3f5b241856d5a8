import { unit } from 'mathjs'
import type { Layout } from '@shared/layouts'
import type { CoordinateKind } from '@shared/units'

/** A row as a stranger would read it out of a file, in nm or rad (internal angle; 0 is cis), kJ/mol, K. */
export interface ReadRow {
  /** null where the layout does not write it. */
  readonly coordinate: number | null
  readonly energy: number | null
  readonly force: number | null
}

const LENGTHS = { nm: 'nm', angstrom: 'angstrom', degree: 'deg', radian: 'rad' } as const
/** Molar gas constant in kJ/(mol K), CODATA 2018 (exact). */
const GAS = 8.31446261815324e-3

const toInternal = (name: keyof typeof LENGTHS): number =>
  unit(1, LENGTHS[name]).toNumber(name === 'nm' || name === 'angstrom' ? 'nm' : 'rad')
const toKilojoule = (name: 'kJ/mol' | 'kcal/mol' | 'kT', temperature: number): number => {
  if (name === 'kT') return GAS * temperature
  return name === 'kJ/mol' ? 1 : 4.184
}

/**
 * Reads a table file with nothing but what its layout states, and none of the code that wrote it: cells by separator, words of a
 * row template by `pattern`, or JSON; then units and conventions undone.
 *
 * @param pattern named groups row, coordinate, energy, force, derivative; for row templates
 */
export function readLayoutFile(
  text: string,
  layout: Layout,
  kind: CoordinateKind,
  temperature: number,
  pattern?: RegExp,
): ReadRow[] {
  const own = layout[kind]
  const lines = text.split(layout.lineEnd === 'crlf' ? '\r\n' : '\n')
  const records =
    layout.writing === 'json'
      ? jsonRecords(text)
      : layout.writing === 'template'
        ? lines.flatMap((line) => patternRecord(line, pattern!))
        : lines.flatMap((line) => cellRecord(line, layout))
  const energyUnit = toKilojoule(own.energyUnit, temperature)
  const forceUnit = toKilojoule(own.force.energyUnit, temperature) / toInternal(own.force.per)
  const coordinateUnit = toInternal(own.coordinateUnit)
  const rows = records.map(({ coordinate, energy, force, derivative }) => ({
    coordinate: coordinate === undefined ? null : coordinate * coordinateUnit,
    energy: energy === undefined ? null : energy * energyUnit,
    force:
      force !== undefined ? force * forceUnit : derivative !== undefined ? -derivative * forceUnit : null,
  }))
  return rows.map((row) => undoConvention(row, layout, kind))
}

type Cells = Partial<Record<'row' | 'coordinate' | 'energy' | 'force' | 'derivative', number>>

function cellRecord(line: string, layout: Layout): Cells[] {
  const part = { spaces: / +/, tab: /\t/, comma: /,/, semicolon: /;/ }[layout.separator]
  const cells = line.trim().split(part)
  const values = cells.map(Number)
  if (
    cells.length !== layout.columns.length ||
    cells.some((cell, index) => cell === '' || Number.isNaN(values[index]))
  )
    return []
  return [Object.fromEntries(layout.columns.map((column, index) => [column, values[index]]))]
}

function patternRecord(line: string, pattern: RegExp): Cells[] {
  const groups = pattern.exec(line)?.groups
  return groups
    ? [Object.fromEntries(Object.entries(groups).map(([name, cell]) => [name, Number(cell)]))]
    : []
}

function jsonRecords(text: string): Cells[] {
  const { columns, rows } = JSON.parse(text) as { columns: (keyof Cells)[]; rows: number[][] }
  return rows.map((row) => Object.fromEntries(columns.map((column, index) => [column, row[index]])))
}

/** θ = π − supplement, and the force turns its sign; φ = φ' + π, and the force keeps it. */
function undoConvention(
  { coordinate, energy, force }: ReadRow,
  layout: Layout,
  kind: CoordinateKind,
): ReadRow {
  if (kind === 'angle' && layout.angle.reading === 'supplement') {
    return {
      coordinate: coordinate === null ? null : Math.PI - coordinate,
      energy,
      force: force === null ? null : -force,
    }
  }
  if (kind === 'dihedral' && layout.dihedral.zero === 'trans' && coordinate !== null) {
    return { coordinate: coordinate + Math.PI, energy, force }
  }
  return { coordinate, energy, force }
}

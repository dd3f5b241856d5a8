import { compositionMass, formulaText } from '../chemistry'
import { type DataSheet, dataSheetSchema } from '../contracts/data-sheet'
import { beadComposition } from '../mapping'
import { fixedWords } from './number-words'
import { firstLines } from './first-lines'
import { carryLines } from './sheet-carry'
import { formLines, verdictRows, warningRows } from './sheet-evidence'
import { sheetFacts, signOffLines, subtitleWords } from './sheet-facts'
import { sheetMethods } from './sheet-methods'
import { beforeYouRun } from './sheet-notes'
import type { SheetSource } from './sheet-source'
import { glyphBeads, sheetTables } from './sheet-tables'

/** Decimals of a mass in g/mol: those of the atomic weights, less one. */
const MASS_DECIMALS = 3

/**
 * The data sheet of a release: everything that screen, print and PDF say of it, in words and drawn numbers. Pure: the same
 * release gives the same sheet.
 */
export function makeDataSheet(source: SheetSource): DataSheet {
  const { frozen, unit, drawing, tables, pairs, tablesSha256 } = source
  const { number, title, notes, polymer, group, invented, releasedAt, replaces, differences } = frozen
  const shown = tables.find(({ single }) => single !== null) ?? tables[0]
  return dataSheetSchema.parse({
    format: 'beadwright data sheet',
    version: 1,
    number,
    title,
    polymer: polymer.name,
    subtitle: subtitleWords(frozen),
    group,
    invented,
    releasedAt,
    facts: sheetFacts(frozen),
    notes,
    beads: {
      rows: frozen.mapping.document.beads.map((bead) => {
        const counts = beadComposition(unit, bead)
        return {
          name: bead.name,
          colour: bead.colour,
          label: bead.label || bead.type,
          formula: formulaText(counts),
          mass: fixedWords(compositionMass(counts), MASS_DECIMALS),
        }
      }),
      unit: {
        formula: polymer.formula,
        mass: fixedWords(polymer.mass, MASS_DECIMALS),
        smiles: polymer.smiles,
      },
      drawing,
    },
    beforeYouRun: beforeYouRun(source),
    tables: sheetTables(source),
    leftOut: frozen.leftOut.map(({ name, kind, types, reason }) => ({
      name,
      kind,
      reason,
      beads: glyphBeads(frozen, types),
    })),
    firstLines: shown ? { path: shown.path, lines: firstLines(shown.text) } : null,
    carry: carryLines(source),
    forms: formLines(source),
    verdicts: verdictRows(pairs),
    warnings: warningRows(tables),
    changed:
      replaces === null
        ? null
        : { since: replaces, lines: differences.map(({ about, text }) => ({ title: about, text })) },
    ...sheetMethods(source),
    signOff: signOffLines(frozen),
    tablesSha256,
  } satisfies DataSheet)
}

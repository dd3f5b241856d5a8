import { compositionMass, formulaText, type RepeatUnit } from '@shared/chemistry'
import { beadComposition, type MappingDocument } from '@shared/mapping'
import { csvText } from '@shared/csv'
import { atomWords } from '../atom-words'
import type { MappingCaption } from '@shared/mapping-drawing'

/** The beads of a mapping as comma-separated values, a row for each. */
export function mappingCsv(unit: RepeatUnit, { beads }: MappingDocument, caption: MappingCaption): string {
  const counts = beads.map((bead) => beadComposition(unit, bead))
  return csvText(
    [
      `${caption.polymer}, mapping ${caption.mapping}: beads of one repeat unit ${unit.smiles}`,
      ...(caption.invented ? ['Invented (demonstration)'] : []),
    ],
    [
      { header: 'bead', values: beads.map(({ name }) => name) },
      { header: 'type', values: beads.map(({ type }) => type) },
      { header: 'word', values: beads.map(({ label }) => label) },
      { header: 'atoms', values: beads.map((bead) => atomWords(unit, bead)) },
      { header: 'formula', values: counts.map(formulaText) },
      { header: 'mass (g/mol)', values: counts.map(compositionMass) },
      {
        header: 'site',
        values: beads.map(({ site }) =>
          site.rule === 'atom' ? `atom ${unit.atoms[site.atom]?.label ?? ''}` : site.rule,
        ),
      },
    ],
  )
}

import type { SheetLine } from '../contracts/data-sheet'
import { listWords } from '../mapping/list-words'
import { placeFlags } from '../mapping'
import { statePointWords } from './sheet-facts'
import type { SheetSource } from './sheet-source'

/** How far the tables carry: where they hold, what they leave out, what was pooled, what nobody looked at. */
export function carryLines({ frozen, unit, tables, pairs }: SheetSource): SheetLine[] {
  const beyond = tables.filter(({ single }) => single !== null && single.inversion.kind !== 'dihedral')
  return [
    {
      title: 'State point',
      text: `The tables hold at ${statePointWords(frozen)}. Nothing here was tested at another temperature, pressure or composition.`,
    },
    {
      title: 'Bonded terms only',
      text: 'The tables say nothing of beads that no term connects. Which near neighbours are left out of the non-bonded sum is for whoever adds one to decide and to state.',
    },
    {
      title: 'Term by term',
      text: 'Each table was made by itself. What terms have in common is counted in each of them, so run a chain on the tables and compare its distributions with those shown here before you rely on them.',
    },
    ...(beyond.length === 0
      ? []
      : [
          {
            title: 'Beyond the data',
            text: 'Bonds and angles continue quadratically where no data are (dotted in the figures). The slope there keeps a chain in place; it was not measured.',
          },
        ]),
    ...placeFlags(unit, frozen.mapping.document)
      .filter(
        ({ choice, name }) =>
          choice !== 'split' && tables.some((table) => namesIn(table.name).includes(name)),
      )
      .map(({ name, detail, choice }) => ({
        title: name,
        text: choice === 'pooled' ? `One table for places that differ. ${detail}` : pooledUnasked(detail),
      })),
    ...apartLines(pairs),
  ]
}

function apartLines(pairs: SheetSource['pairs']): SheetLine[] {
  const coupled = pairs.filter(
    ({ numbers, decision, apart }) =>
      numbers.verdict === 'joint' && (decision?.choice !== 'joint' || apart !== null),
  )
  if (coupled.length === 0) return []
  return [
    {
      title: 'Coupled terms',
      text: `${listWords(coupled.map(({ name }) => name))}: a joint potential is advised, but the tables are single. Their joint distribution will not be reproduced.`,
    },
  ]
}

const namesIn = (name: string): string[] => name.split(' · ')

/** The advice of the board is for whoever makes the mapping, not for whoever reads the sheet. */
const pooledUnasked = (detail: string): string =>
  `One table for places that differ. ${detail.replace(/ One table for .*$/, '')} Nobody recorded why they are pooled.`

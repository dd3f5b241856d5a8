import type { RepeatUnit } from '@shared/chemistry'
import type { Bead } from '@shared/mapping'

/** Where a bead sits, in words: 'centre of mass', 'on C3'. */
export function siteWords(unit: RepeatUnit, { site }: Bead): string {
  if (site.rule === 'mass') return 'centre of mass'
  if (site.rule === 'geometry') return 'geometric centre'
  return `on ${unit.atoms[site.atom]?.label ?? 'no atom'}`
}

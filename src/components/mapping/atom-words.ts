import type { RepeatUnit } from '@shared/chemistry'
import type { Bead, MappingDocument } from '@shared/mapping'

/** The atoms of a bead in words, runs of three and more drawn together: 'C3, O1, O2', 'C4–C9'; a share behind a shared one. */
export function atomWords(unit: RepeatUnit, bead: Bead): string {
  const words: { label: string; element: string; number: number; plain: boolean }[] = bead.atoms.map(
    ({ atom, weight, unit: shift }) => {
      const { label, element } = unit.atoms[atom]
      const share = weight === 1 ? '' : ` × ${Number(weight.toFixed(3))}`
      const place = shift === 0 ? '' : shift > 0 ? ' of the next unit' : ' of the unit before'
      return {
        label: `${label}${share}${place}`,
        element,
        number: Number(label.slice(element.length)),
        plain: share === '' && place === '',
      }
    },
  )
  const parts: string[] = []
  for (let start = 0; start < words.length;) {
    let end = start
    while (end + 1 < words.length && follows(words[end], words[end + 1])) end++
    if (end - start >= 2) parts.push(`${words[start].label}–${words[end].label}`)
    else parts.push(...words.slice(start, end + 1).map(({ label }) => label))
    start = end + 1
  }
  return parts.join(', ')
}

/**
 * What an atom is called where it can be painted: 'C3, in bead E', 'C9, in no bead', 'C1, in bead B of the unit before', and in
 * a neighbouring unit 'C1 of the next unit, in bead B'.
 *
 * @param shown which unit it is drawn in
 */
export function atomName(unit: RepeatUnit, document: MappingDocument, atom: number, shown = 0): string {
  const holders = document.beads.flatMap(({ name, atoms }) =>
    atoms.filter((held) => held.atom === atom).map((held) => `${name}${unitWords(shown - held.unit)}`),
  )
  const where = holders.length === 0 ? 'no bead' : `bead ${holders.join(' and ')}`
  return `${unit.atoms[atom].label}${unitWords(shown)}, in ${where}`
}

function unitWords(shift: number): string {
  if (shift === 0) return ''
  const far = Math.abs(shift) > 1 ? 'but one ' : ''
  return shift > 0 ? ` of the next unit ${far}`.trimEnd() : ` of the unit before ${far}`.trimEnd()
}

function follows(
  one: { element: string; number: number; plain: boolean },
  next: { element: string; number: number; plain: boolean },
): boolean {
  return one.plain && next.plain && one.element === next.element && next.number === one.number + 1
}

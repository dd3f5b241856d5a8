import { afterEach, describe, expect, it } from 'vitest'
import { h } from 'vue'
import { layoutRepeatUnit, parseRepeatUnit } from '@shared/chemistry'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer } from '@shared/contracts/polymer'
import { setTermUse, deriveTerms } from '@shared/mapping'
import MappingSheet from '@/components/mapping/MappingSheet.vue'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../unit/shared/mapping/hexyl-acrylate'
import { control, mountAt, pageText } from '../../support/mount'

const drawn = {
  unit: await parseRepeatUnit(HEXYL_ACRYLATE),
  layout: await layoutRepeatUnit(HEXYL_ACRYLATE),
}
const left = deriveTerms(drawn.unit, THREE_TO_ONE).find(({ name }) => name === 'B–B–B–E')
if (!left) throw new Error('The coarse mapping has this dihedral.')
const mapping = {
  id: 'm',
  polymerId: 'p',
  name: '3-to-1',
  document: setTermUse(THREE_TO_ONE, left, 'left out', 'turns with B–B–B–B'),
  revision: 4,
  savedAt: '2026-01-05T10:00:00.000Z',
} as Mapping
const polymer = { id: 'p', name: 'poly(n-hexyl acrylate)', demo: true } as Polymer

afterEach(() => {
  document.body.innerHTML = ''
})

describe('a mapping on paper', () => {
  it('says what it is made of, what follows, what is left out and why, and what is estimated', async () => {
    const view = { render: () => h(MappingSheet, { drawn, mapping, polymer }) }
    await mountAt('mapping-print', '/polymers/p/mappings/m/mapping/print', view)
    const text = pageText()
    expect(text).toContain('poly(n-hexyl acrylate), mapping 3-to-1')
    expect(text).toContain('INVENTED (demonstration)')
    expect(text).toContain('revision 4, saved 2026-01-05')
    expect(text).toContain('C3, O1, O2 CO244.009centre of mass')
    // Along the backbone B stands twice in a row once per unit.
    expect(text).toContain('bondB–B1used')
    expect(text).toContain('left out: turns with B–B–B–B')
    expect(text).toContain('9 of 81 degrees of freedom kept')
    expect(text).toMatch(/About 410 times less work.*time step is taken as 5 times/)
    expect(document.querySelectorAll('.halo:not(.halo--faint)')).toHaveLength(3)
    expect(control('Back to the board').getAttribute('href')).toBe('/polymers/p/mappings/m/mapping')
  })
})

import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { checkMapping, deriveTerms, type MappingDocument } from '@shared/mapping'
import MappingBeads from '@/components/mapping/MappingBeads.vue'
import MappingChain from '@/components/mapping/MappingChain.vue'
import MappingProblems from '@/components/mapping/MappingProblems.vue'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { bead, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from '../../unit/shared/mapping/hexyl-acrylate'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)
const words = (text: string): string => text.replace(/\s+/g, ' ').trim()

describe('MappingBeads', () => {
  const table = (document: MappingDocument, selected: string | null = null, readonly = false) =>
    mount(MappingBeads, {
      props: {
        unit,
        document,
        selected,
        readonly,
        loose: checkMapping(unit, document).find(({ code }) => code === 'ATOM_IN_NO_BEAD') ?? null,
      },
      global: { plugins: [createBeadwrightVuetify()] },
    })
  const cells = (wrapper: ReturnType<typeof table>): string[][] =>
    wrapper.findAll('tbody tr:not(.editor), tfoot tr').map((row) =>
      row
        .findAll('th, td')
        .map((cell) => words(cell.text()))
        .filter((text) => text !== ''),
    )

  it('says what each bead is made of, and the masses sum to the repeat unit', () => {
    expect(cells(table(THREE_TO_ONE))).toEqual([
      ['B', 'B', 'C1, C2', 'C2H3', '27.046', 'centre of mass'],
      ['E', 'E', 'C3, O1, O2', 'CO2', '44.009', 'centre of mass'],
      ['H', 'H', 'C4–C9', 'C6H13', '85.170', 'centre of mass'],
      ['repeat unit', 'C9H16O2', '156.225'],
    ])
  })

  it('keeps a row for atoms in no bead, and no mass for a bead without atoms', () => {
    const rows = cells(
      table(mapping(...THREE_TO_ONE.beads.slice(0, 2), bead('H', [5, 6, 7, 8, 9]), bead('K', []))),
    )
    expect(rows[3]).toEqual(['K', 'K', '–', 'centre of mass'])
    expect(rows[4]).toEqual(['C9', '15.035', 'in no bead'])
  })

  it('offers the fields of the bead in hand only, and none to those who read', () => {
    expect(table(THREE_TO_ONE).find('input').exists()).toBe(false)
    expect(table(THREE_TO_ONE, 'e', true).find('input').exists()).toBe(false)
    const labels = table(THREE_TO_ONE, 'e')
      .findAll('label')
      .map((label) => words(label.text()))
    expect(labels).toEqual(expect.arrayContaining(['Letters', 'Type', 'In a word']))
  })

  it('changes a field that keeps its rule, and says the rule where it does not', async () => {
    const wrapper = table(THREE_TO_ONE, 'e')
    const [, type] = wrapper.findAll('.editor input')
    await type.setValue('ES T')
    expect(wrapper.get('[role=alert]').text()).toBe('Up to 8 letters, digits, _ and +.')
    expect(type.attributes('aria-describedby')).toBe(wrapper.get('[role=alert]').attributes('id'))
    expect(wrapper.emitted('change')).toBeUndefined()
    await type.setValue('EST')
    expect(wrapper.find('[role=alert]').exists()).toBe(false)
    expect(wrapper.emitted('change')).toEqual([['e', { type: 'EST' }]])
  })

  it('takes a bead by its row and removes the one in hand', async () => {
    const wrapper = table(THREE_TO_ONE, 'e')
    await wrapper.get('[aria-label="Take bead H"]').trigger('click')
    expect(wrapper.emitted('select')).toEqual([['h']])
    const remove = wrapper.findAll('button').find((each) => each.text() === 'Remove bead')
    await remove?.trigger('click')
    expect(wrapper.emitted('remove')).toEqual([['e']])
  })
})

describe('MappingChain', () => {
  const terms = deriveTerms(unit, THREE_TO_ONE)
  const chain = (name: string | null, document = THREE_TO_ONE) =>
    mount(MappingChain, {
      props: { unit, document, pointed: terms.find((term) => term.name === name) ?? null },
    })

  it('draws three units and tells them in words', () => {
    const wrapper = chain(null)
    expect(wrapper.findAll('.base-bead-disc')).toHaveLength(9)
    expect(wrapper.get('[role=img]').attributes('aria-label')).toContain('B–B to the next unit')
    expect(wrapper.findAll('.chain__rim')).toHaveLength(0)
  })

  it('lights the places of the term that is pointed at, with what tells them apart', () => {
    const wrapper = chain('B–B–E')
    expect(wrapper.findAll('.chain__rim')).toHaveLength(2)
    expect(wrapper.text()).toContain('B–B–E at its two places')
    expect(wrapper.findAll('.chain__note .over').map((note) => note.text())).toEqual(
      expect.arrayContaining(['by its CH2', 'by its CH']),
    )
  })

  it('says when there is nothing to draw', () => {
    expect(chain(null, mapping()).text()).toContain('as soon as a bead holds atoms')
  })
})

describe('MappingProblems', () => {
  const document = mapping(
    bead('B', [0, 1]),
    bead('E', [2, 3, 4], { site: { rule: 'atom', atom: 9 } }),
    bead('H', [5, 6, 7, 8, 9]),
    bead('K', []),
  )
  const list = (readonly = false) =>
    mount(MappingProblems, { props: { unit, document, problems: checkMapping(unit, document), readonly } })

  it('says what is wrong, why, and what can be done', () => {
    const warnings = list().findAll('[aria-label=Warning]')
    expect(warnings).toHaveLength(3)
    expect(warnings[0].get('.base-warning__title').text()).toBe('C9 is in no bead')
    expect(words(warnings[0].text())).toContain(
      'Its 15.035 g/mol would be missing from every unit of the chain.',
    )
    expect(warnings[0].findAll('button').map((button) => button.text())).toEqual(['Give it to H'])
  })

  it('passes on each way to mend it', async () => {
    const wrapper = list()
    for (const button of wrapper.findAll('button')) await button.trigger('click')
    expect(wrapper.emitted('give')).toEqual([[[10], 'h']])
    expect(wrapper.emitted('change')).toEqual([['e', { site: { rule: 'mass' } }]])
    expect(wrapper.emitted('select')).toEqual([['k']])
    expect(wrapper.emitted('remove')).toEqual([['k']])
  })

  it('offers nothing to those who read', () => {
    expect(list(true).findAll('button')).toHaveLength(0)
  })
})

import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import PolymerNewView from '@/views/PolymerNewView.vue'
import { click, fakeApi, field, freshStores, mountAt, pageText, submit, type } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const SMILES = 'Repeat unit, SMILES with two *'
const open = (role: 'modeller' | 'reviewer' = 'modeller') =>
  mountAt('polymer-new', '/polymers/new', PolymerNewView, freshStores(role))
const here = (text: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(text), 5000)

describe('PolymerNewView', () => {
  it('draws the repeat unit while it is typed, with formula, mass, rings and ends', async () => {
    const { wrapper } = await open()
    await type(SMILES, '*CC(*)c1ccccc1')
    await here('104.152 g/mol')
    expect(pageText()).toContain('8 heavy, 8 hydrogens')
    expect(pageText()).toContain('1, aromatic')
    expect(pageText()).toContain('C1 and C2')
    await vi.waitFor(() => expect(wrapper.find('.repeat-unit svg').exists()).toBe(true))
  })

  it('points at the place in the SMILES that is wrong', async () => {
    const { wrapper } = await open()
    await type(SMILES, '*CC(*)C(=O)OC(CCC')
    await here('The parenthesis opened at character 14 is never closed.')
    const lines = wrapper.find('.polymer-place').element.textContent.split('\n')
    expect(lines[0].trimEnd()[lines[1].indexOf('^')]).toBe('(')
    expect(lines[1].indexOf('^')).toBe(13)
    expect(field(SMILES).getAttribute('aria-invalid')).toBe('true')
  })

  it('cuts a long SMILES around the place and keeps the caret under it', async () => {
    const { wrapper } = await open()
    await type(SMILES, `*${'C'.repeat(60)}(C${'C'.repeat(60)}*`)
    await here('is never closed')
    const [shown, caret] = wrapper.find('.polymer-place').element.textContent.split('\n')
    expect(shown.length).toBeLessThan(50)
    expect(shown[caret.indexOf('^')]).toBe('(')
  })

  it('adds nothing that is not a repeat unit, however fast it is sent', async () => {
    const sent = fakeApi({})
    await open()
    await type('Name', 'polyethylene')
    await type(SMILES, '*CC')
    await submit()
    await here(/two \*/)
    expect(sent).toEqual([])
  })

  it('adds the polymer to the group and opens its room', async () => {
    const sent = fakeApi({ 'POST /api/groups/group/polymers': { status: 201, body: { id: '7' } } })
    const { router } = await open()
    await type('Name', 'polyethylene')
    await type(SMILES, '*CC*')
    await submit()
    await vi.waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0].body).toEqual({ name: 'polyethylene', smiles: '*CC*', notes: '' })
    await vi.waitFor(() => expect(router.currentRoute.value.fullPath).toBe('/polymers/7'))
  })

  it('says at the name that the group has one of that name', async () => {
    const body = { code: 'NAME_TAKEN', message: 'The group has a polymer of this name.', field: 'name' }
    fakeApi({ 'POST /api/groups/group/polymers': { status: 409, body } })
    await open()
    await type('Name', 'polyethylene')
    await type(SMILES, '*CC*')
    await submit()
    await here('The group has a polymer of this name.')
    expect(field('Name').getAttribute('aria-invalid')).toBe('true')
  })

  it('takes an example at a touch', async () => {
    await open()
    await click('Try polydimethylsiloxane')
    expect(field(SMILES).value).toBe('*[Si](C)(C)O*')
    await here('74.154 g/mol')
  })

  it('offers no form to someone who only reads', async () => {
    const { wrapper } = await open('reviewer')
    expect(pageText()).toContain('You may not add polymers')
    expect(wrapper.find('form').exists()).toBe(false)
  })
})

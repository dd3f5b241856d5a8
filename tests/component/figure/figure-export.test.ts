import { enableAutoUnmount, flushPromises, mount } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { createVuetify } from 'vuetify'
import FigureExport from '@/components/figure/FigureExport.vue'
import * as png from '@/components/figure/picture-png'
import * as saving from '@/components/figure/save-file'

const saveFile = vi.spyOn(saving, 'saveFile')
const pngOf = vi.spyOn(png, 'pngOf')

enableAutoUnmount(afterEach)
beforeEach(() => {
  saveFile.mockReset()
  pngOf.mockReset()
})

const open = async () => {
  const files = {
    name: () => 'polyethylene_bond',
    picture: () => ({ width: 10, height: 10, title: 'bond', body: '<g/>' }),
    csv: () => 'r (nm)\r\n0.1\r\n',
  }
  const wrapper = mount(FigureExport, {
    props: { files },
    global: { plugins: [createVuetify()] },
    attachTo: document.body,
  })
  await wrapper.get('button').trigger('click')
  await flushPromises()
  const choose = async (format: string): Promise<void> => {
    const items = [...document.querySelectorAll<HTMLElement>('[role=menu] [role=menuitem]')]
    items.find((item) => item.textContent?.includes(format))!.click()
    await flushPromises()
  }
  return { wrapper, choose }
}

describe('FigureExport', () => {
  it('is a button that says it opens a menu', async () => {
    const { wrapper } = await open()
    const button = wrapper.get('button')
    expect(button.attributes('aria-label')).toBe('Export figure')
    expect(button.attributes('aria-haspopup')).toBe('menu')
  })

  it('saves the picture as an SVG document and the numbers as text, under the name of the figure', async () => {
    const { choose } = await open()
    await choose('SVG')
    await choose('CSV')
    expect(saveFile.mock.calls.map(([name]) => name)).toEqual([
      'polyethylene_bond.svg',
      'polyethylene_bond.csv',
    ])
    const [svg, csv] = saveFile.mock.calls.map(([, content]) => content)
    expect(svg.type).toContain('image/svg+xml')
    expect(await svg.text()).toMatch(/^<svg .*<g\/><\/svg>$/)
    expect(await csv.text()).toBe('r (nm)\r\n0.1\r\n')
  })

  it('saves what the browser drew as PNG, and says so where it could not draw', async () => {
    const { wrapper, choose } = await open()
    pngOf.mockResolvedValueOnce(new Blob(['drawn'], { type: 'image/png' }))
    await choose('PNG')
    expect(saveFile.mock.calls[0][0]).toBe('polyethylene_bond.png')
    expect(wrapper.find('[role=alert]').exists()).toBe(false)
    pngOf.mockRejectedValueOnce(new Error('no canvas'))
    await choose('PNG')
    expect(wrapper.get('[role=alert]').text()).toContain('The SVG is the same picture')
    expect(saveFile).toHaveBeenCalledTimes(1)
  })
})

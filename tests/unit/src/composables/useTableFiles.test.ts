import { describe, expect, it } from 'vitest'
import { tableFileOf } from '@/composables/useTableFiles'

const text = `# INVENTED data
# coordinate[nm] energy[kJ/mol] force[kJ/mol/nm]
  0.20   4.5   90
  0.25   0.0    0

  0.30   3.25 -80
`

describe('tableFileOf', () => {
  it('reads rows, domain and lowest point from the text of the file itself', () => {
    expect(tableFileOf('bond_B-E_400K.txt', text, 'nm')).toEqual({
      name: 'bond_B-E_400K.txt',
      text,
      unit: 'nm',
      rows: 3,
      low: 0.2,
      high: 0.3,
      lowestAt: 0.25,
    })
  })

  it('shows no numbers for a file without rows', () => {
    expect(tableFileOf('empty.txt', '# nothing\n', 'degree')).toMatchObject({
      rows: 0,
      low: Number.NaN,
      lowestAt: Number.NaN,
    })
  })
})

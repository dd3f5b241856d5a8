import { describe, expect, it } from 'vitest'
import {
  fileNamePart,
  jointTableFileName,
  namesInOneFolder,
  tableFileName,
} from '../../../../server/services/table-names'

const table = (types: string[], temperature = 400) => ({ kind: 'bond' as const, types, temperature })

describe('names of table files', () => {
  it('say kind, types and temperature', () => {
    expect(tableFileName(table(['B', 'E']))).toBe('bond_B-E_400K.txt')
    expect(tableFileName(table(['B', 'E'], 298.15))).toBe('bond_B-E_298.15K.txt')
  })

  it('say which place a term is where its sequence is split', () => {
    expect(tableFileName({ ...table(['B', 'B', 'E']), placeNumber: 2 })).toBe('bond_B-B-E_place2_400K.txt')
    const types = [
      ['B', 'E'],
      ['B', 'B', 'E'],
    ] as const
    const placeNumbers = [undefined, 1] as const
    expect(jointTableFileName({ types, temperature: 400, placeNumbers })).toBe(
      'joint_B-E_B-B-E_place1_400K.txt',
    )
  })

  it('of two terms together say both', () => {
    const types = [
      ['B', 'E'],
      ['B', 'E', 'H'],
    ] as const
    expect(jointTableFileName({ types, temperature: 400 })).toBe('joint_B-E_B-E-H_400K.txt')
  })

  it('stay apart where capitals do not count', () => {
    const names = namesInOneFolder(
      [table(['B', 'E']), table(['b', 'E']), table(['b', 'e']), table(['X', 'Y'])].map((each) =>
        tableFileName(each),
      ),
    )
    expect(names).toEqual([
      'bond_B-E_400K.txt',
      'bond_b-E_400K_2.txt',
      'bond_b-e_400K_3.txt',
      'bond_X-Y_400K.txt',
    ])
  })
})

describe('fileNamePart', () => {
  it.each([
    ['poly(n-hexyl acrylate)', 'poly-n-hexyl-acrylate'],
    ['Größe ½', 'Gro-e-1-2'],
    ['../../etc/passwd', 'etc-passwd'],
    ['聚合物', 'unnamed'],
    ['', 'unnamed'],
  ])('makes of %s what every system can write', (name, expected) => {
    expect(fileNamePart(name)).toBe(expected)
  })

  it('does not get too long', () => {
    expect(fileNamePart('x'.repeat(500))).toHaveLength(60)
  })
})

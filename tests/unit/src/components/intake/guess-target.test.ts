import { describe, expect, it } from 'vitest'
import type { Pair } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import type { StatePoint } from '@shared/contracts/polymer'
import { guessStatePoint, guessTarget, targetKey } from '@/components/intake/guess-target'

const term = (kind: Term['kind'], ...types: string[]): Term =>
  ({ id: `${kind}-${types.join('')}`, kind, types, name: types.join('–') }) as Term

const terms = [
  term('bond', 'B', 'E'),
  term('bond', 'E', 'S1'),
  term('angle', 'B', 'E', 'S1'),
  term('dihedral', 'B', 'B', 'E', 'S1'),
]
const pair = { firstTermId: 'bond-ES1', secondTermId: 'angle-BES1' } as Pair
const guess = (name: string) => {
  const target = guessTarget(name, terms, [pair])
  return target && targetKey(target)
}

describe('guessTarget', () => {
  it.each([
    ['B-E.txt', 'bond-BE'],
    ['BE_400K.hist', 'bond-BE'],
    ['bond_E-B_400K.dat', 'bond-BE'],
    ['angle.B-E-S1.csv', 'angle-BES1'],
    ['S1–E–B.txt', 'angle-BES1'],
    ['dihedral_B_B_E_S1.xvg', 'dihedral-BBES1'],
  ])('reads the term from %s', (name, id) => {
    expect(guess(name)).toBe(id)
  })

  it('takes the longest sequence, since a bond stands inside its angle', () => {
    expect(guess('run3_B-E-S1.txt')).toBe('angle-BES1')
  })

  it('lets a word for the kind decide before the length of the sequence', () => {
    const twins = [term('bond', 'B', 'E'), term('angle', 'B', 'E', 'B')]
    const target = guessTarget('bond_B-E of B-E-B.txt', twins, [])
    expect(target).toEqual({ type: 'term', termId: 'bond-BE' })
  })

  it('sees a pair where both of its terms stand side by side', () => {
    expect(guess('joint_E-S1_B-E-S1.grid')).toBe('bond-ES1~angle-BES1')
    expect(guess('B-E-S1.grid')).toBe('angle-BES1')
  })

  it('does not take a dihedral for the two bonds at its ends', () => {
    const bonds = [...terms, term('bond', 'B', 'B')]
    const ends = { firstTermId: 'bond-BB', secondTermId: 'bond-ES1' } as Pair
    expect(guessTarget('B_B_E_S1.txt', bonds, [ends])).toEqual({ type: 'term', termId: 'dihedral-BBES1' })
    expect(guessTarget('B-B with E-S1.txt', bonds, [ends])).toMatchObject({ type: 'pair', ...ends })
  })

  it('does not find a term inside a word or a longer type', () => {
    expect(guess('BEFORE.txt')).toBeNull()
    expect(guess('E-S12.txt')).toBeNull()
    expect(guess('run7.txt')).toBeNull()
  })
})

describe('guessStatePoint', () => {
  const points = [400, 450].map((temperature) => ({ id: `at${temperature}`, temperature }) as StatePoint)

  it.each([
    ['B-E_450K.txt', 'at450'],
    ['B-E_400 K.txt', 'at400'],
    ['B-E_500K.txt', undefined],
    ['B-E_400Kelvin.txt', undefined],
    ['400K_and_450K.txt', undefined],
    ['B-E.txt', undefined],
  ])('reads the temperature from %s', (name, id) => {
    expect(guessStatePoint(name, points)?.id).toBe(id)
  })

  it('does not choose between two state points of one temperature', () => {
    expect(guessStatePoint('400K.txt', [points[0], { ...points[0], id: 'other' }])).toBeNull()
  })
})

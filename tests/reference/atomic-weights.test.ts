import { expect, it } from 'vitest'
import { atomicWeight } from '@shared/chemistry'
import fixture from './fixtures/atomic-weights.json'

/** Abridged standard atomic weights 2021: Prohaska et al., Pure Appl. Chem. 94 (2022) 573–600 (see the fixture's provenance). */
it.each(Object.entries(fixture.expected.atomic_weight_abridged_2021))(
  'the atomic weight of %s is the published one, digit by digit',
  (element, weight) => {
    expect(atomicWeight(element)).toBe(weight)
  },
)

/** Older conventional weights, from another source: they may differ by the spread of abridging, which guards against slips. */
it.each(Object.entries(fixture.cross_check_older_weights))(
  'the atomic weight of %s lies within 2e-4 of its older value',
  (element, weight) => {
    expect(Math.abs(atomicWeight(element) / weight - 1)).toBeLessThan(2e-4)
  },
)

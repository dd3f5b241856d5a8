import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { basinCurve } from '@shared/basins/counted-basins'
import { basinsAtDepth, mergeTree, type NeighbourList } from '@shared/basins'

function line(count: number, turns = false): NeighbourList {
  return (point, into) => {
    let found = 0
    for (const near of [point - 1, point + 1]) {
      if (turns) into[found++] = (near + count) % count
      else if (near >= 0 && near < count) into[found++] = near
    }
    return found
  }
}

const treeOf = (energies: readonly number[], turns = false) =>
  mergeTree(Float64Array.from(energies), line(energies.length, turns))
const depthsOf = (energies: readonly number[], turns = false) =>
  [...treeOf(energies, turns).depths].sort((a, b) => a - b)

describe('mergeTree', () => {
  it('pairs the minima of a line with the barriers they spill over', () => {
    // Minima 1 (at 1), 0 (at 5), 2 (at 3); barriers 4 (at 2) and 3 (at 4).
    const tree = treeOf([5, 1, 4, 2, 3, 0, 6])
    expect([...tree.minima]).toEqual([5, 1, 3])
    expect([...tree.saddles]).toEqual([-1, 2, 4])
    expect([...tree.depths]).toEqual([Infinity, 3, 1])
    expect([...tree.labels]).toEqual([1, 1, 1, 2, 0, 0, 0])
  })

  it('goes the lower way around a turn', () => {
    const energies = [0, 5, 1, 2]
    expect(depthsOf(energies)).toEqual([4, Infinity])
    expect(depthsOf(energies, true)).toEqual([1, Infinity])
  })

  it('keeps what walls part, and finds nothing where all is wall', () => {
    const tree = treeOf([1, 0, NaN, 3, 4, Infinity, 2])
    expect([...tree.depths]).toEqual([Infinity, Infinity, Infinity])
    expect([...tree.labels]).toEqual([0, 0, -1, 2, 2, -1, 1])
    expect(basinCurve(tree)).toEqual({ lasting: 3, steps: [] })
    expect(basinCurve(treeOf([NaN, NaN]))).toEqual({ lasting: 0, steps: [] })
  })

  it('makes one basin of a flat bottom', () => {
    expect(depthsOf([2, 1, 1, 1, 2])).toEqual([Infinity])
    expect(depthsOf([3, 3, 3])).toEqual([Infinity])
  })

  const energies = fc.array(fc.integer({ min: 0, max: 12 }), { minLength: 1, maxLength: 40 })

  it('gives the same depths for the reversed line and with a constant added', () => {
    fc.assert(
      fc.property(energies, fc.boolean(), fc.integer({ min: -50, max: 50 }), (values, turns, constant) => {
        const expected = depthsOf(values, turns)
        expect(depthsOf([...values].reverse(), turns)).toEqual(expected)
        expect(
          depthsOf(
            values.map((value) => value + constant),
            turns,
          ),
        ).toEqual(expected)
      }),
    )
  })

  it('leaves every depth of a turn where it was when the turn begins elsewhere', () => {
    fc.assert(
      fc.property(energies, fc.nat(), (values, shift) => {
        const from = shift % values.length
        expect(depthsOf([...values.slice(from), ...values.slice(0, from)], true)).toEqual(
          depthsOf(values, true),
        )
      }),
    )
  })

  it('counts at any depth as many basins as the line has minima after filling all that are shallower', () => {
    fc.assert(
      fc.property(energies, fc.integer({ min: 1, max: 12 }), (values, depth) => {
        expect(basinsAtDepth(basinCurve(treeOf(values)), depth)).toBe(deepMinima(values, depth))
      }),
    )
  })
})

/** Counts, without a tree, the groups of places that a ball of energy below `depth` cannot leave for a lower one. */
function deepMinima(values: readonly number[], depth: number): number {
  const reaches = (from: number, step: number) => {
    for (let place = from + step; place >= 0 && place < values.length; place += step) {
      if (values[place] >= values[from] + depth) return false
      if (values[place] < values[from] || (values[place] === values[from] && place < from)) return true
    }
    return false
  }
  return values.filter((_, place) => !reaches(place, 1) && !reaches(place, -1)).length
}

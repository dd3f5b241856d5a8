import { describe, expect, it } from 'vitest'
import type { InvalidInputError } from '@shared/errors'
import { derivePotential, formEnergy } from '@shared/forms'
import {
  DEFAULT_INVERSION_SETTINGS,
  type InversionSettings,
  invert,
  potentialEnergy,
} from '@shared/inversion'
import { makeTable, tableComments } from '@shared/tables'
import { thermalEnergy } from '@shared/units'
import {
  angleCounts,
  bondCounts,
  countsOf,
  dihedralCounts,
  evenEdges,
  TEMPERATURE,
} from '../../src/components/bench/distributions'
import { printedParameters } from '../../../support/printed-parameters'

const kT = thermalEnergy(TEMPERATURE)
const withSettings = (change: Partial<InversionSettings>): InversionSettings => ({
  ...DEFAULT_INVERSION_SETTINGS,
  ...change,
})

/** Two wells that no harmonic form follows; straight angles are populated. */
const twoWells = () =>
  countsOf(
    'angle',
    evenEdges(Math.PI / 3, Math.PI, 60),
    (angle) => 4 * Math.cos(4 * (angle - 1.9)) + 6 * (angle - 2.3) ** 2,
    200_000,
  )

describe('derivePotential', () => {
  it('is the smooth inversion while no form is chosen', () => {
    const { inversion, smooth, form, smoothOffset } = derivePotential(
      angleCounts(),
      TEMPERATURE,
      DEFAULT_INVERSION_SETTINGS,
    )
    expect(inversion).toEqual(invert(angleCounts(), TEMPERATURE, DEFAULT_INVERSION_SETTINGS))
    expect(smooth).toBe(inversion)
    expect([form, smoothOffset]).toEqual([null, 0])
  })

  it.each([
    ['harmonic', bondCounts],
    ['quartic', bondCounts],
    ['gaussians', angleCounts],
    ['cosine-series', dihedralCounts],
  ] as const)('makes every row of the table the form itself: %s', (name, counts) => {
    const histogram = counts()
    const settings = withSettings({ form: name, table: { ...DEFAULT_INVERSION_SETTINGS.table, rows: 300 } })
    const { inversion, form } = derivePotential(histogram, TEMPERATURE, settings)
    const { coordinates, energies } = makeTable(inversion.potential, settings.table)
    const exact = coordinates.map((coordinate) => formEnergy(form!, coordinate))
    const shift = formEnergy(form!, inversion.minimum.coordinate)
    coordinates.forEach((_, row) => {
      const energy = exact[row] - shift
      // The spline of a form keeps within 1e-7 kT, above 100 kT within 1e-9 of the energy; its minimum is found to that.
      expect(Math.abs(energies[row] - energy)).toBeLessThan(1e-6 * kT + 1e-8 * Math.abs(energy))
    })
  })

  it('does not move with the smoothing', () => {
    const energiesAt = (log10Lambda: number) => {
      const settings = withSettings({ form: 'harmonic', smoothing: { mode: 'manual', log10Lambda } })
      return derivePotential(angleCounts(), TEMPERATURE, settings).inversion.potential.energies
    }
    expect(energiesAt(1)).toEqual(energiesAt(8))
  })

  it('says what is lost: how far the form is from the smooth curve, and that it misses the data', () => {
    const { inversion, form } = derivePotential(twoWells(), TEMPERATURE, withSettings({ form: 'harmonic' }))
    expect(form?.largestDeviation?.value).toBeGreaterThan(0.5)
    const warning = inversion.warnings.find(({ code }) => code === 'FORM_MISSES_DATA')
    expect(warning?.message).toContain(`${form?.largestDeviation?.value.toFixed(2)} kT`)
    const right = derivePotential(angleCounts(), TEMPERATURE, withSettings({ form: 'harmonic' }))
    expect(right.inversion.warnings.map(({ code }) => code)).not.toContain('FORM_MISSES_DATA')
  })

  it('judges the slope at 180° on the form, not on the curve it stands for', () => {
    const wide = countsOf('angle', evenEdges(1, Math.PI, 60), (angle) => 12 * (angle - 2.5) ** 2, 200_000)
    const codes = (form: string) =>
      derivePotential(wide, TEMPERATURE, withSettings({ form })).inversion.warnings.map(({ code }) => code)
    expect(codes('harmonic')).toContain('SLOPE_AT_STRAIGHT_ANGLE')
    expect(codes('cosine-harmonic')).not.toContain('SLOPE_AT_STRAIGHT_ANGLE')
  })

  it('lays the smooth curve over the form without a mean difference', () => {
    const { inversion, smooth, smoothOffset } = derivePotential(
      twoWells(),
      TEMPERATURE,
      withSettings({ form: 'harmonic' }),
    )
    const mean = smooth.regenerated.reduce((sum, mass, bin) => {
      const at = smooth.bins.midpoints[bin]
      const difference =
        potentialEnergy(inversion.potential, at) - potentialEnergy(smooth.potential, at) - smoothOffset
      return sum + mass * difference
    }, 0)
    expect(Math.abs(mean)).toBeLessThan(1e-9)
    expect(inversion.rawOffset - smooth.rawOffset).toBeCloseTo(smoothOffset, 12)
  })

  it.each(['no such form', 'cosine-series', 'quartic'])('refuses what it cannot fit: %s', (form) => {
    // A straight, falling density has no quartic that rises outwards.
    const falling = countsOf('angle', evenEdges(1, Math.PI, 40), (angle) => -6 * (angle - 2) ** 4, 50_000)
    const histogram = form === 'quartic' ? falling : angleCounts()
    const refused = (): InvalidInputError | null => {
      try {
        derivePotential(histogram, TEMPERATURE, withSettings({ form }))
        return null
      } catch (error) {
        return error as InvalidInputError
      }
    }
    expect(refused()).toMatchObject({ code: 'SETTING_INVALID', place: { field: 'form' } })
  })
})

describe('the comments of a table from a form', () => {
  const units = { coordinateUnit: 'degree', energyUnit: 'kcal/mol' } as const
  const settings = withSettings({ form: 'harmonic', straightAngle: 'level' })
  const { inversion, form } = derivePotential(angleCounts(), TEMPERATURE, settings)
  const lines = tableComments({
    invented: false,
    polymer: null,
    mapping: null,
    term: null,
    kind: 'angle',
    beadOrder: null,
    temperature: TEMPERATURE,
    statePoint: null,
    units,
    settings,
    smoothing: inversion.smoothing,
    form,
    independentSamples: inversion.independentSamples,
    warnings: [],
    input: null,
    rowsSha256: 'c',
    savedOn: null,
  })

  it('name it with its formula in plain letters, and what it is not', () => {
    expect(lines).toContain(
      'form: harmonic, U = 1/2 k (theta - theta0)^2; the rows are this form, not the smoothed curve',
    )
    expect(lines.some((line) => line.startsWith('form deviates: by up to'))).toBe(true)
    expect(lines.some((line) => /^(tails|straight angle):/.test(line))).toBe(false)
  })

  it('print parameters that give the rows in the units of the table', () => {
    const parameters = printedParameters(lines.join('\n'))
    // 60 (θ − 110°)² kJ/mol/rad²: k = 120 kJ/mol/rad², to its standard error of about 1 %.
    expect(parameters.k * 4.184 * (180 / Math.PI) ** 2).toBeCloseTo(120, -1)
    expect(parameters.theta0).toBeCloseTo(110, 0)
  })
})

import { expect, it } from 'vitest'
import { logFactorial } from '@shared/numeric/log-factorial'

it('is ln of the product of the whole numbers, across the seam between table and series', () => {
  let sum = 0
  for (let n = 1; n <= 3000; n++) {
    sum += Math.log(n)
    // the running sum itself loses about n·1e-16 of its value
    expect(Math.abs(logFactorial(n) - sum)).toBeLessThan(1e-12 * Math.max(1, sum))
  }
  expect(logFactorial(0)).toBe(0)
})

/**
 * Exact conversion of a cosine series into powers of a cosine: Σ a_n cos nφ = Σ C_n cosⁿ ψ with ψ = φ − 180°, by the
 * Chebyshev recurrence cos nφ = 2 cos φ cos (n − 1)φ − cos (n − 2)φ and cos φ = −cos ψ.
 *
 * @param series a_0 … a_N, any energy unit; φ is 0 in cis
 * @returns C_0 … C_N in the same unit; ψ is 0 in trans (Ryckaert & Bellemans, Chem. Phys. Lett. 30 (1975) 123)
 * @example cosinePowersFromSeries([1, 0, 1]) // 0, 0, 2: 1 + cos 2φ = 2 cos² ψ
 */
export function cosinePowersFromSeries(series: readonly number[]): number[] {
  const powers = new Array<number>(series.length).fill(0)
  chebyshev(series.length).forEach((polynomial, n) => {
    polynomial.forEach((coefficient, power) => (powers[power] += series[n] * coefficient))
  })
  return powers.map(alternate)
}

/**
 * The reverse of `cosinePowersFromSeries`, exact as well: Σ C_n cosⁿ ψ = Σ a_n cos nφ.
 *
 * @param powers C_0 … C_N
 * @returns a_0 … a_N
 * @example cosineSeriesFromPowers([0, 0, 2]) // 1, 0, 1
 */
export function cosineSeriesFromPowers(powers: readonly number[]): number[] {
  const left = powers.map(alternate)
  const series = new Array<number>(powers.length).fill(0)
  const polynomials = chebyshev(powers.length)
  // The highest power comes from the highest cosine alone; taken off, the next one does. Only powers of 2 divide.
  for (let n = powers.length - 1; n >= 0; n--) {
    series[n] = left[n] / polynomials[n][n]
    polynomials[n].forEach((coefficient, power) => (left[power] -= series[n] * coefficient))
  }
  return series
}

/** (−1)ⁿ of cosⁿ φ = (−cos ψ)ⁿ; adding 0 makes −0 plain. */
function alternate(value: number, n: number): number {
  return (n % 2 === 0 ? value : -value) + 0
}

/** Coefficients of T_0 … T_(count − 1), lowest power first. */
function chebyshev(count: number): number[][] {
  const polynomials: number[][] = [[1], [0, 1]].slice(0, count)
  for (let n = 2; n < count; n++) {
    const doubled = [0, ...polynomials[n - 1].map((coefficient) => 2 * coefficient)]
    polynomials.push(doubled.map((coefficient, power) => coefficient - (polynomials[n - 2][power] ?? 0)))
  }
  return polynomials
}

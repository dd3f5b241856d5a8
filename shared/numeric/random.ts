import { InvalidInputError } from '../errors'
import { logFactorial } from './log-factorial'

/** A stream of random numbers. Everything drawn from it follows from its seed, on every machine. */
export interface Random {
  /** Uniform in [0, 1), with 53 random bits. */
  uniform(): number
  /** Whole number, uniform in 0 … below − 1; `below` from 1 to 2³². */
  integer(below: number): number
  /** Normal with mean 0 and variance 1. */
  normal(): number
  /** Poisson with the given mean ≥ 0, below 2³¹. */
  poisson(mean: number): number
}

/** Above this mean a Poisson number comes from transformed rejection, below from multiplication. */
const POISSON_REJECTION_FROM = 10

/**
 * A seeded random number generator: xoshiro128** 1.1 (Blackman & Vigna, ACM Trans. Math. Softw. 47 (2021) 36), its state
 * filled from the seed by a 32-bit splitmix. Not for secrets.
 *
 * @param seed whole number in 0 … 2³² − 1
 * @throws {InvalidInputError} SETTING_INVALID for any other seed
 * @example createRandom(7).uniform() === createRandom(7).uniform() // true
 */
export function createRandom(seed: number): Random {
  if (!Number.isInteger(seed) || seed < 0 || seed > 0xffffffff) {
    throw new InvalidInputError(
      'SETTING_INVALID',
      `A seed is a whole number from 0 to 4294967295, not ${seed}.`,
      {
        field: 'seed',
      },
    )
  }
  const next = xoshiro(seed)
  const uniform = () => ((next() >>> 5) * 0x4000000 + (next() >>> 6)) / 0x20000000000000
  return {
    uniform,
    integer: (below) => integerBelow(next, below),
    normal: normalFrom(uniform),
    poisson: (mean) =>
      mean < POISSON_REJECTION_FROM ? poissonByProduct(uniform, mean) : poissonByRejection(uniform, mean),
  }
}

/** Unsigned 32-bit numbers from a seed. */
function xoshiro(seed: number): () => number {
  let fill = seed | 0
  const splitmix = () => {
    fill = (fill + 0x9e3779b9) | 0
    let z = fill
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b)
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35)
    return z ^ (z >>> 16)
  }
  let a = splitmix()
  let b = splitmix()
  let c = splitmix()
  let d = splitmix()
  return () => {
    const scrambled = Math.imul(rotateLeft(Math.imul(b, 5), 7), 9)
    const shifted = b << 9
    c ^= a
    d ^= b
    b ^= c
    a ^= d
    c ^= shifted
    d = rotateLeft(d, 11)
    return scrambled >>> 0
  }
}

function rotateLeft(value: number, bits: number): number {
  return (value << bits) | (value >>> (32 - bits))
}

/** Rejects the incomplete last turn, so that no number is favoured. */
function integerBelow(next: () => number, below: number): number {
  const limit = 0x100000000 - (0x100000000 % below)
  let drawn = next()
  while (drawn >= limit) drawn = next()
  return drawn % below
}

/** Marsaglia's polar method (SIAM Rev. 6 (1964) 260); the second number of a pair is kept for the next call. */
function normalFrom(uniform: () => number): () => number {
  let kept: number | null = null
  return () => {
    if (kept !== null) {
      const value = kept
      kept = null
      return value
    }
    let x, y, square
    do {
      x = 2 * uniform() - 1
      y = 2 * uniform() - 1
      square = x * x + y * y
    } while (square >= 1 || square === 0)
    const factor = Math.sqrt((-2 * Math.log(square)) / square)
    kept = y * factor
    return x * factor
  }
}

function poissonByProduct(uniform: () => number, mean: number): number {
  const limit = Math.exp(-mean)
  let product = uniform()
  let count = 0
  while (product > limit) {
    product *= uniform()
    count++
  }
  return count
}

/** Transformed rejection with squeeze, PTRS of Hörmann (Insur. Math. Econ. 12 (1993) 39). */
function poissonByRejection(uniform: () => number, mean: number): number {
  const b = 0.931 + 2.53 * Math.sqrt(mean)
  const a = -0.059 + 0.02483 * b
  const inverseAlpha = 1.1239 + 1.1328 / (b - 3.4)
  const squeeze = 0.9277 - 3.6224 / (b - 2)
  const logMean = Math.log(mean)
  for (;;) {
    const u = uniform() - 0.5
    const v = uniform()
    const distance = 0.5 - Math.abs(u)
    const count = Math.floor(((2 * a) / distance + b) * u + mean + 0.43)
    if (distance >= 0.07 && v <= squeeze) return count
    if (count < 0 || (distance < 0.013 && v > distance)) continue
    const left = Math.log((v * inverseAlpha) / (a / (distance * distance) + b))
    if (left <= count * logMean - mean - logFactorial(count)) return count
  }
}

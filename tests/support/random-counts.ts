/** Seeded uniform numbers in [0, 1) (mulberry32): the same seed gives the same test data everywhere. */
export function seededUniform(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = state
    mixed = Math.imul(mixed ^ (mixed >>> 15), mixed | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296
  }
}

/** A standard normal number (Box–Muller). */
export function normal(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())
}

/** A Poisson count: by multiplication of uniforms up to mean 30, above it by the rounded normal approximation. */
export function poissonCounts(mean: number, random: () => number): number {
  if (mean > 30) return Math.max(0, Math.round(mean + Math.sqrt(mean) * normal(random)))
  const limit = Math.exp(-mean)
  let count = 0
  for (let product = random(); product > limit; product *= random()) count += 1
  return count
}

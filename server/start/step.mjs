/** Says what is being done, does it, and adds how long it took. */
export async function step(title, work) {
  const begun = performance.now()
  process.stdout.write(`${title} … `)
  try {
    const result = await work()
    process.stdout.write(`${((performance.now() - begun) / 1000).toFixed(1)} s\n`)
    return result
  } catch (error) {
    process.stdout.write('failed\n')
    throw error
  }
}

/** Asks `condition` every `interval` ms; its first truthy answer, or null after `limit` ms. */
export async function waitUntil(condition, { limit = Infinity, interval = 50 } = {}) {
  const end = performance.now() + limit
  for (;;) {
    const answer = await condition()
    if (answer) return answer
    if (performance.now() >= end) return null
    await new Promise((resolve) => setTimeout(resolve, interval))
  }
}

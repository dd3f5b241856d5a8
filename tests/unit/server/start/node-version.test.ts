import { describe, expect, it } from 'vitest'
import { nodeVersionProblem } from '../../../../server/start/node-version.mjs'

describe('nodeVersionProblem', () => {
  it.each(['v20.19.0', 'v20.20.2', 'v22.0.0', 'v24.1.0'])('has nothing against %s', (version) => {
    expect(nodeVersionProblem(version)).toBeNull()
  })

  it.each(['v20.18.3', 'v18.20.0', 'v8.19.1'])('names both versions for %s', (version) => {
    expect(nodeVersionProblem(version)).toBe(`Beadwright needs Node 20.19 or newer; this is ${version}.`)
  })
})

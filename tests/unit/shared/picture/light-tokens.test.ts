import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { lightTokens } from '@shared/picture'

describe('lightTokens', () => {
  it('are the light tokens of the page', () => {
    const css = readFileSync('src/assets/tokens.css', 'utf8')
    const light = /\[data-theme=light\]\{([^}]*)\}/.exec(css)?.[1] ?? ''
    for (const [name, value] of Object.entries(lightTokens)) expect(light).toContain(`--${name}:${value};`)
  })
})

import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { darkTokens, lightTokens, type ThemeTokens } from '@/plugins/theme-tokens'

const css = readFileSync('src/assets/tokens.css', 'utf8')

/** The declarations of the first block whose selector is the one given. */
const block = (selector: string): Map<string, string> => {
  const body = css
    .slice(css.indexOf(`${selector}{`))
    .split('{')[1]
    .split('}')[0]
  return new Map([...body.matchAll(/--([\w-]+):([^;]+)/g)].map((match) => [match[1], match[2]]))
}

describe('theme tokens', () => {
  it.each<[string, ThemeTokens]>([
    ['[data-theme=light]', lightTokens],
    ['[data-theme=dark]', darkTokens],
  ])('of the component library are those of tokens.css under %s', (selector, tokens) => {
    const declared = block(selector)
    expect(declared.size).toBeGreaterThan(40)
    expect(tokens).toEqual(Object.fromEntries(Object.keys(tokens).map((name) => [name, declared.get(name)])))
  })
})

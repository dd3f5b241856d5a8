import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { packagesAreCurrent } from '../../../../server/start/packages.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

interface Entry {
  version: string
  integrity: string
  optional?: boolean
}
const one: Entry = { version: '1.0.0', integrity: 'sha512-one' }
const native: Entry = { version: '1.0.0', integrity: 'sha512-native', optional: true }

function tree(wanted: Record<string, Entry>, installed: Record<string, Entry> | null): string {
  const root = temporaryFolder()
  const own = { '': { version: '0.1.0' } }
  writeFileSync(join(root, 'package-lock.json'), JSON.stringify({ packages: { ...own, ...wanted } }))
  mkdirSync(join(root, 'node_modules', 'one'), { recursive: true })
  if (installed) {
    writeFileSync(join(root, 'node_modules', '.package-lock.json'), JSON.stringify({ packages: installed }))
  }
  return root
}

describe('packagesAreCurrent', () => {
  it('is content with what the lock asks for', () => {
    expect(packagesAreCurrent(tree({ 'node_modules/one': one }, { 'node_modules/one': one }))).toBe(true)
  })

  it('does not miss optional packages of other systems', () => {
    const wanted = { 'node_modules/one': one, 'node_modules/native': native }
    expect(packagesAreCurrent(tree(wanted, { 'node_modules/one': one }))).toBe(true)
  })

  it('sees an installation that was cut short', () => {
    expect(packagesAreCurrent(tree({ 'node_modules/one': one }, null))).toBe(false)
  })

  it.each([
    ['another version', { 'node_modules/one': { ...one, version: '1.0.1' } }],
    ['another content', { 'node_modules/one': { ...one, integrity: 'sha512-other' } }],
    ['a missing package', {}],
    ['a package too many', { 'node_modules/one': one, 'node_modules/two': one }],
  ])('sees %s', (_what, installed) => {
    expect(packagesAreCurrent(tree({ 'node_modules/one': one }, installed))).toBe(false)
  })
})

import { mkdirSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { buildIsCurrent } from '../../../../server/start/build.mjs'
import { hashOfFiles } from '../../../../server/start/file-hash.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

function builtTree(): string {
  const root = temporaryFolder()
  for (const folder of ['src', 'dist/client', 'dist/server'])
    mkdirSync(join(root, folder), { recursive: true })
  writeFileSync(join(root, 'src', 'main.ts'), 'one')
  writeFileSync(join(root, 'dist', 'client', 'index.html'), '')
  writeFileSync(join(root, 'dist', 'server', 'index.js'), '')
  writeFileSync(join(root, 'dist', 'built-from'), hashOfFiles(root, ['src']))
  return root
}

describe('buildIsCurrent', () => {
  it('is content with a build from the same sources', () => {
    expect(buildIsCurrent(builtTree())).toBe(true)
  })

  it('sees a changed source', () => {
    const root = builtTree()
    writeFileSync(join(root, 'src', 'main.ts'), 'two')
    expect(buildIsCurrent(root)).toBe(false)
  })

  it.each(['dist', 'dist/built-from', 'dist/client/index.html', 'dist/server/index.js'])(
    'sees that %s is missing',
    (path) => {
      const root = builtTree()
      rmSync(join(root, path), { recursive: true })
      expect(buildIsCurrent(root)).toBe(false)
    },
  )
})

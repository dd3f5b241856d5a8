import { mkdirSync, renameSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { hashOfFiles } from '../../../../server/start/file-hash.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

function sources(): string {
  const root = temporaryFolder()
  mkdirSync(join(root, 'src', 'deep'), { recursive: true })
  writeFileSync(join(root, 'src', 'a.ts'), 'one')
  writeFileSync(join(root, 'src', 'deep', 'b.ts'), 'two')
  return root
}

describe('hashOfFiles', () => {
  it('stays the same while the files do', () => {
    expect(hashOfFiles(sources(), ['src'])).toBe(hashOfFiles(sources(), ['src']))
  })

  it('changes with a content deep down', () => {
    const root = sources()
    const before = hashOfFiles(root, ['src'])
    writeFileSync(join(root, 'src', 'deep', 'b.ts'), 'three')
    expect(hashOfFiles(root, ['src'])).not.toBe(before)
  })

  it('changes with a name', () => {
    const root = sources()
    const before = hashOfFiles(root, ['src'])
    renameSync(join(root, 'src', 'a.ts'), join(root, 'src', 'c.ts'))
    expect(hashOfFiles(root, ['src'])).not.toBe(before)
  })

  it('looks at nothing else, and passes over what does not exist', () => {
    const root = sources()
    const before = hashOfFiles(root, ['src', 'public'])
    writeFileSync(join(root, 'README.md'), 'text')
    expect(hashOfFiles(root, ['src'])).toBe(before)
  })
})

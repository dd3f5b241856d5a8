import { mkdirSync, symlinkSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { chooseDataFolder, isTemporary } from '../../../../server/start/data-folder.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

const choose = (repository: string, given: string | null = null): string =>
  chooseDataFolder({ given, repository, user: null, environment: { XDG_DATA_HOME: '/data-home' } })

describe('chooseDataFolder', () => {
  it('takes the folder that was given', () => {
    expect(choose('/srv/beadwright', '/srv/data')).toBe('/srv/data')
  })

  it('is .data in the clone', () => {
    expect(choose('/srv/beadwright')).toBe('/srv/beadwright/.data')
  })

  it('is outside a clone in a temporary folder, and never shared by two clones of the same name', () => {
    const [one, other] = [choose('/tmp/a/beadwright'), choose('/tmp/b/beadwright')]
    expect(one).toMatch(/^\/data-home\/beadwright\/beadwright-[0-9a-f]{10}$/)
    expect(other).not.toBe(one)
    expect(choose('/tmp/a/beadwright')).toBe(one)
  })

  it('stays with data that exist', () => {
    const repository = temporaryFolder()
    mkdirSync(join(repository, '.data', 'postgres', 'cluster'), { recursive: true })
    expect(choose(repository)).toBe(join(repository, '.data'))
  })
})

describe('isTemporary', () => {
  it.each(['/tmp', '/tmp/a/b', '/var/tmp/x', '/dev/shm/x'])('says yes to %s', (folder) => {
    expect(isTemporary(folder)).toBe(true)
  })

  it.each(['/srv/tmp', '/tmpfiles', '/var/lib/beadwright'])('says no to %s', (folder) => {
    expect(isTemporary(folder)).toBe(false)
  })

  it('is not deceived by a link', () => {
    const target = temporaryFolder()
    symlinkSync(target, join(target, 'link'))
    expect(isTemporary(join(target, 'link', 'not', 'there'))).toBe(true)
  })
})

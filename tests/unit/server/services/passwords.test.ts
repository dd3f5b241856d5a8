import { verify } from '@node-rs/argon2'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { hashPassword, verifyPassword } from '../../../../server/services/passwords'

vi.mock(import('@node-rs/argon2'), async (importOriginal) => {
  const original = await importOriginal()
  return {
    ...original,
    verify: vi.fn(original.verify),
  }
})

beforeEach(() => {
  vi.mocked(verify).mockClear()
})

describe('passwords', () => {
  it('are known again by their hash, which differs each time', async () => {
    const [one, other] = [await hashPassword('correct horse'), await hashPassword('correct horse')]
    expect(one).not.toBe(other)
    expect(await verifyPassword('correct horse', one)).toBe(true)
    expect(await verifyPassword('Correct horse', one)).toBe(false)
  })

  it('are never right where there is no account, and the same work is done to say so', async () => {
    const hash = await hashPassword('something')
    expect(await verifyPassword('a guess', hash)).toBe(false)
    expect(await verifyPassword('a guess', null)).toBe(false)
    const [known, unknown] = vi.mocked(verify).mock.calls.map(([stored]) => String(stored))
    const cost = /^\$argon2id\$v=19\$m=19456,t=2,p=1\$/
    expect(known).toMatch(cost)
    expect(unknown).toMatch(cost)
    expect(unknown).not.toBe(known)
  })
})

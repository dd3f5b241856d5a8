import { describe, expect, it } from 'vitest'
import { errorForLog } from '../../../server/logger'

describe('errorForLog', () => {
  it('tells what, where and why, down to the cause', () => {
    const cause = new TypeError('the root of it')
    const logged = errorForLog(new Error('outside', { cause })) as { cause: object; stack: string }
    expect(logged).toMatchObject({ type: 'Error', message: 'outside', cause: { message: 'the root of it' } })
    expect(logged.stack).toContain('logger.test')
  })

  it('leaves out the values of a failed statement', () => {
    const error = Object.assign(new Error('insert failed'), {
      query: 'insert into "user" values ($1)',
      parameters: ['$argon2id$hash'],
      driverError: { code: '23505', constraint: 'UQ_user_email', detail: 'Key (email)=(a@b.example) exists' },
    })
    const text = JSON.stringify(errorForLog(error))
    expect(text).toContain('UQ_user_email')
    expect(text).not.toContain('argon2id')
    expect(text).not.toContain('a@b.example')
  })
})

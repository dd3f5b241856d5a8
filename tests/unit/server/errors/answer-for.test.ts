import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import { InvalidInputError } from '@shared/errors'
import { answerFor } from '../../../../server/errors/answer-for'
import { HttpError } from '../../../../server/errors/http-error'

describe('answerFor', () => {
  it('hands on what the core refuses, with its place, as 422', () => {
    const error = new InvalidInputError('COUNT_NEGATIVE', 'Line 3 …', { line: 3, column: 2 })
    expect(answerFor(error, 'id')).toMatchObject({
      status: 422,
      body: { code: 'COUNT_NEGATIVE', line: 3, column: 2, requestId: 'id' },
      unexpected: false,
    })
  })

  it('names the fields of a contract that was not met', () => {
    const schema = z.object({ table: z.object({ rows: z.number() }), name: z.string() })
    const { error } = schema.safeParse({ table: { rows: 'x' } })
    const { status, body } = answerFor(error, 'id')
    expect([status, body.code, body.field]).toEqual([400, 'VALIDATION_FAILED', 'table.rows'])
    expect(body.issues?.map(({ field }) => field)).toEqual(['table.rows', 'name'])
  })

  it.each([
    ['23505', 'UQ_polymer_name', 409, 'NAME_TAKEN'],
    ['23505', 'UQ_mapping_name', 409, 'NAME_TAKEN'],
    ['23505', 'UQ_distribution_current', 409, 'CONFLICT'],
    ['23503', 'FK_term_mapping', 409, 'CONFLICT'],
    ['40P01', undefined, 409, 'CONFLICT'],
    ['40001', undefined, 409, 'CONFLICT'],
    ['22021', undefined, 400, 'VALIDATION_FAILED'],
    ['57P01', undefined, 503, 'UNAVAILABLE'],
    ['53300', undefined, 503, 'UNAVAILABLE'],
    ['08006', undefined, 503, 'UNAVAILABLE'],
    ['ECONNREFUSED', undefined, 503, 'UNAVAILABLE'],
    ['42P01', undefined, 500, 'INTERNAL'],
  ])('takes the error %s %s of the database as %i %s', (code, constraint, status, expected) => {
    const error = Object.assign(new Error('query failed'), { driverError: { code, constraint } })
    expect(answerFor(error, 'id')).toMatchObject({ status, body: { code: expected } })
  })

  it('tells nothing of a fault of ours but the request id', () => {
    const { body, unexpected } = answerFor(new TypeError('reading properties of undefined'), 'the-id')
    expect(body).toMatchObject({ code: 'INTERNAL', requestId: 'the-id' })
    expect(body.message).not.toContain('undefined')
    expect(unexpected).toBe(true)
  })

  it('keeps the current record of a conflict', () => {
    const details = { revision: 4 }
    const { body } = answerFor(new HttpError('CONFLICT', 'Saved in between.', { details }), 'id')
    expect(body.details).toEqual(details)
  })
})

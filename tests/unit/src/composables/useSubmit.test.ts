import { describe, expect, it, vi } from 'vitest'
import { z } from 'zod'
import { ApiError } from '@/api/http'
import { useSubmit } from '@/composables/useSubmit'

const schema = z.object({ name: z.string().min(1, 'Give it a name.'), size: z.number('How large?') })
const open = () => useSubmit<{ name: string; size?: number }>(schema, ['name', 'size'])

describe('useSubmit', () => {
  it('sends nothing that does not fit, and says so at each field', async () => {
    const { submit, messages } = open()
    const send = vi.fn()
    expect(await submit({ name: '' }, send)).toBe(false)
    expect(send).not.toHaveBeenCalled()
    expect(messages.value).toEqual({ name: 'Give it a name.', size: 'How large?' })
  })

  it('sends once, however often it is pressed', async () => {
    const { submit, busy } = open()
    let finish: () => void = () => undefined
    const send = vi.fn(() => new Promise<void>((resolve) => (finish = resolve)))
    const first = submit({ name: 'a', size: 1 }, send)
    expect(busy.value).toBe(true)
    expect(await submit({ name: 'a', size: 1 }, send)).toBe(false)
    finish()
    expect(await first).toBe(true)
    expect(send).toHaveBeenCalledOnce()
    expect(busy.value).toBe(false)
  })

  it('puts what the server says about a field at the field', async () => {
    const { submit, messages, failure } = open()
    const taken = new ApiError(409, { code: 'NAME_TAKEN', message: 'There is one.', field: 'name' })
    await submit({ name: 'a', size: 1 }, () => Promise.reject(taken))
    expect(messages.value).toEqual({ name: 'There is one.' })
    expect(failure.value).toBeNull()
  })

  it('keeps what is about no field for the form, until the next try', async () => {
    const { submit, messages, failure } = open()
    const away = new ApiError(0, { code: 'NO_CONNECTION', message: 'Away.' })
    await submit({ name: 'a', size: 1 }, () => Promise.reject(away))
    expect(failure.value).toBe(away)
    expect(messages.value).toEqual({})
    await submit({ name: 'a', size: 1 }, () => Promise.resolve())
    expect(failure.value).toBeNull()
  })

  it('does not swallow an error of its own', async () => {
    const { submit, busy } = open()
    await expect(submit({ name: 'a', size: 1 }, () => Promise.reject(new TypeError('bug')))).rejects.toThrow(
      'bug',
    )
    expect(busy.value).toBe(false)
  })
})

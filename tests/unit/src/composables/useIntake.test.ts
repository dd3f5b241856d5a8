import { flushPromises } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { effectScope, ref } from 'vue'
import type { Pair } from '@shared/contracts/distribution'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { StatePoint } from '@shared/contracts/polymer'
import type { IntakeSettings } from '@shared/intake'
import * as distributions from '@/api/distributions'
import { ApiError } from '@/api/http'
import * as jointDistributions from '@/api/joint-distributions'
import { isReady, settingsOf, useIntake } from '@/composables/useIntake'
import { useWorkbenchStore } from '@/stores/workbench'
import type { IntakeWorker } from '@/workers/intake'
import { readText } from '@/workers/intake-task'
import { freshStores } from '../../../support/mount'

const term = (kind: Term['kind'], ...types: string[]): Term =>
  ({ id: types.join(''), kind, types, name: types.join('–') }) as Term
const points = [400, 450].map((temperature) => ({ id: `at${temperature}`, temperature }) as StatePoint)
const pairs = ref<Pair[]>([{ firstTermId: 'BE', secondTermId: 'BEH' } as Pair])

const bond = '0.30 12\n0.31 15\n0.32 18\n0.33 14\n0.34 9\n'
const grid = [0, 1, 2, 3, 4]
  .flatMap((i) => [0, 1, 2, 3, 4].map((j) => `${0.3 + i / 100} ${90 + 4 * j} 7`))
  .join('\n')
const file = (name: string, text: string) => new File([text], name)

const forgotten = vi.fn()
const stopped = vi.fn()
const worker: IntakeWorker = {
  readFile: async (_id, blob, task) => readText(await blob.text(), task),
  forgetFile: (id) => {
    forgotten(id)
    return Promise.resolve()
  },
  stop: stopped,
}
let scope = effectScope()
const open = () => scope.run(() => useIntake(pairs, () => worker))!

const storeOne = vi.spyOn(distributions, 'storeDistribution')
const storeTwo = vi.spyOn(jointDistributions, 'storeJointDistribution')

beforeEach(() => {
  freshStores()
  vi.clearAllMocks()
  storeOne.mockResolvedValue({} as never)
  storeTwo.mockResolvedValue({} as never)
  scope = effectScope()
  const workbench = useWorkbenchStore()
  workbench.mapping = { id: 'mapping' } as Mapping
  workbench.statePoints = points
  workbench.statePoint = points[0]
  workbench.terms = [term('bond', 'B', 'E'), term('bond', 'E', 'H'), term('angle', 'B', 'E', 'H')]
})
afterEach(() => scope.stop())

describe('useIntake', () => {
  it('reads every file that is brought as what its name says, at the state point it names', async () => {
    const desk = open()
    desk.bring([file('B-E_450K.txt', bond), file('joint B-E with B-E-H.txt', grid)], null)
    await flushPromises()
    expect(
      desk.items.map(({ target, statePointId, guessed }) => [target?.type, statePointId, guessed]),
    ).toEqual([
      ['term', 'at450', true],
      ['pair', 'at400', true],
    ])
    expect(desk.items.map(isReady)).toEqual([true, true])
    expect(desk.current.value?.file.name).toBe('B-E_450K.txt')
  })

  it('takes the term one came from when the name says nothing, and waits when nobody said', async () => {
    const desk = open()
    desk.bring([file('run7.txt', bond)], { type: 'term', termId: term('bond', 'E', 'H').id })
    desk.bring([file('run8.txt', bond)], null)
    await flushPromises()
    expect(desk.items.map(({ target }) => target)).toEqual([{ type: 'term', termId: 'EH' }, null])
    expect(desk.items.map(isReady)).toEqual([true, false])
  })

  it('keeps what was set when a file is aimed at a term of the same kind, and guesses anew for another', async () => {
    const desk = open()
    desk.bring([file('B-E.txt', bond)], null)
    await flushPromises()
    const item = desk.items[0]
    await desk.read(item, { ...(settingsOf(item) as IntakeSettings), unit: 'angstrom' })
    expect(item.reasons.length).toBeGreaterThan(0)
    desk.aim(item, { type: 'term', termId: 'EH' })
    await flushPromises()
    expect(settingsOf(item)).toMatchObject({ kind: 'bond', unit: 'angstrom' })
    desk.aim(item, { type: 'term', termId: 'BEH' })
    await flushPromises()
    expect(settingsOf(item)).toMatchObject({ kind: 'angle', unit: 'radian' })
  })

  it('stores a file with the settings it was read with, and takes it off the desk', async () => {
    const desk = open()
    desk.bring([file('B-E_450K.txt', bond), file('E-H.txt', bond)], null)
    await flushPromises()
    const [item, next] = desk.items
    expect(await desk.store(item)).toBe(true)
    expect(storeOne).toHaveBeenCalledWith('BE', item.file, {
      statePointId: 'at450',
      settings: expect.objectContaining({
        kind: 'bond',
        unit: 'nm',
        alreadyDivided: false,
      }) as IntakeSettings,
    })
    expect(desk.items).toEqual([next])
    expect(desk.current.value?.id).toBe(next.id)
    expect(forgotten).toHaveBeenCalledWith(item.id)
  })

  it('stores a pair with both of its terms', async () => {
    const desk = open()
    desk.bring([file('B-E_B-E-H.grid', grid)], null)
    await flushPromises()
    expect(await desk.store(desk.items[0])).toBe(true)
    expect(storeTwo.mock.calls[0][0]).toBe('mapping')
    expect(storeTwo.mock.calls[0][2]).toMatchObject({
      firstTermId: 'BE',
      secondTermId: 'BEH',
      settings: { kinds: ['bond', 'angle'], units: ['nm', 'degree'] },
    })
  })

  it('takes a file for a pair as soon as the pairs are known, unless somebody said what it is', async () => {
    const known = pairs.value
    pairs.value = []
    const desk = open()
    desk.bring([file('B-E_B-E-H.txt', grid), file('B-E_B-E-H_again.txt', grid)], null)
    desk.aim(desk.items[1], { type: 'term', termId: 'EH' })
    pairs.value = known
    await flushPromises()
    expect(desk.items.map(({ target }) => target)).toEqual([
      { type: 'pair', firstTermId: 'BE', secondTermId: 'BEH' },
      { type: 'term', termId: 'EH' },
    ])
    expect(isReady(desk.items[0])).toBe(true)
  })

  it('never stores a file that cannot be read', async () => {
    const desk = open()
    desk.bring([file('B-E.txt', '0.3 twelve\n')], null)
    await flushPromises()
    expect(await desk.store(desk.items[0])).toBe(false)
    expect(storeOne).not.toHaveBeenCalled()
    expect(desk.items).toHaveLength(1)
  })

  it('keeps the file and says why when the server refuses it', async () => {
    storeOne.mockRejectedValue(new ApiError(410, { code: 'TERM_GONE', message: 'The term is gone.' }))
    const desk = open()
    desk.bring([file('B-E.txt', bond)], null)
    await flushPromises()
    expect(await desk.store(desk.items[0])).toBe(false)
    expect(desk.items[0]).toMatchObject({ failure: 'The term is gone.', storing: false })
  })

  it('stops its worker when the room is left', async () => {
    const desk = open()
    desk.bring([file('B-E.txt', bond)], null)
    await flushPromises()
    scope.stop()
    expect(stopped).toHaveBeenCalledOnce()
  })
})

import { expose } from 'comlink'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { startInversionWorker } from '@/workers'
import * as inversionTask from '@/workers/inversion-task'
import { angleCounts, TEMPERATURE } from '../components/bench/distributions'

const task = {
  histogram: angleCounts(),
  temperature: TEMPERATURE,
  settings: DEFAULT_INVERSION_SETTINGS,
  basinDepth: 0.5,
  flatBelow: 0.5,
}

/** A worker as the page sees it, its far end in the same thread: everything still crosses by structured clone. */
class NearWorker extends EventTarget {
  static last: NearWorker
  readonly terminate = vi.fn(() => this.near.close())
  private readonly near: MessagePort

  constructor() {
    super()
    const { port1, port2 } = new MessageChannel()
    this.near = port1
    port1.onmessage = (event: MessageEvent<unknown>) =>
      this.dispatchEvent(new MessageEvent('message', { data: event.data }))
    expose(inversionTask, port2)
    NearWorker.last = this
  }
  postMessage(message: unknown, transfer: Transferable[] = []): void {
    this.near.postMessage(message, transfer)
  }
}

afterEach(() => vi.unstubAllGlobals())

describe('startInversionWorker', () => {
  it('brings typed arrays back whole', async () => {
    vi.stubGlobal('Worker', NearWorker)
    const worker = startInversionWorker()
    const { table } = await worker.runInversion(task)
    expect(table.energies).toEqual(inversionTask.runInversion(task).answer?.table.energies)
    worker.stop()
    expect(NearWorker.last.terminate).toHaveBeenCalled()
  })

  it('rejects with the error the core threw', async () => {
    vi.stubGlobal('Worker', NearWorker)
    const worker = startInversionWorker()
    const failure = await worker.findAutomatic({ ...task, temperature: 0 }).catch((error: unknown) => error)
    expect(failure).toBeInstanceOf(InvalidInputError)
    expect((failure as InvalidInputError).code).toBe('TEMPERATURE_INVALID')
    worker.stop()
  })

  it('rejects when the worker itself cannot be loaded, instead of waiting for ever', async () => {
    vi.stubGlobal('Worker', NearWorker)
    const worker = startInversionWorker()
    const waiting = worker.runInversion(task).catch((error: unknown) => error)
    NearWorker.last.dispatchEvent(Object.assign(new Event('error'), { message: 'gone' }))
    expect(await waiting).toMatchObject({ message: 'gone' })
    worker.stop()
  })
})

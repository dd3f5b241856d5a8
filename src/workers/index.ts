import { releaseProxy, wrap } from 'comlink'
import { InvalidInputError } from '@shared/errors'
import type * as inversionTask from './inversion-task'
import type { InversionAnswer, InversionTask, Outcome, RankingAnswer } from './inversion-task'

export type { InversionAnswer, InversionTask, RankingAnswer }

/** Inversions off the main thread. Input the core refuses rejects with InvalidInputError, as it would on this side. */
export interface InversionWorker {
  runInversion(task: InversionTask): Promise<InversionAnswer>
  runRanking(task: InversionTask): Promise<RankingAnswer>
  findAutomatic(task: InversionTask): Promise<number | null>
  stop(): void
}

/** Starts a worker for inversions; it lives until `stop`. */
export const startInversionWorker = (): InversionWorker => {
  const worker = new Worker(new URL('./inversion.worker.ts', import.meta.url), { type: 'module' })
  const remote = wrap<typeof inversionTask>(worker)
  const broken = new Promise<never>((_, reject) => {
    worker.addEventListener('error', (event) => {
      reject(new Error(event.message || 'The part of the program that computes could not be loaded.'))
    })
  })
  // Without a question under way nobody waits for this.
  broken.catch(() => undefined)
  return {
    runInversion: async (task) => unwrap(await Promise.race([remote.runInversion(task), broken])),
    runRanking: async (task) => unwrap(await Promise.race([remote.runRanking(task), broken])),
    findAutomatic: async (task) => unwrap(await Promise.race([remote.findAutomatic(task), broken])),
    stop: () => {
      remote[releaseProxy]()
      worker.terminate()
    },
  }
}

const unwrap = <Answer>(outcome: Outcome<Answer>): Answer => {
  if (outcome.refusal === null) return outcome.answer
  const { code, message, place } = outcome.refusal
  throw new InvalidInputError(code, message, place)
}

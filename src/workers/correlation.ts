import { releaseProxy, wrap } from 'comlink'
import type { Correlation, VerdictThresholds } from '@shared/correlation'
import { InvalidInputError } from '@shared/errors'
import type { JointHistogram } from '@shared/histogram'
import type * as correlationTask from './correlation-task'

/** Correlations off the main thread. Input the core refuses rejects with InvalidInputError. */
export interface CorrelationWorker {
  runCorrelation(joint: JointHistogram, thresholds: VerdictThresholds): Promise<Correlation>
  stop(): void
}

/** Starts a worker for correlations; it lives until `stop`. */
export const startCorrelationWorker = (): CorrelationWorker => {
  const worker = new Worker(new URL('./correlation.worker.ts', import.meta.url), { type: 'module' })
  const remote = wrap<typeof correlationTask>(worker)
  const broken = new Promise<never>((_, reject) => {
    worker.addEventListener('error', (event) => {
      reject(new Error(event.message || 'The part of the program that computes could not be loaded.'))
    })
  })
  // Without a question under way nobody waits for this.
  broken.catch(() => undefined)
  return {
    runCorrelation: async (joint, thresholds) => {
      const { correlation, refusal } = await Promise.race([remote.runCorrelation(joint, thresholds), broken])
      if (refusal === null) return correlation
      throw new InvalidInputError(refusal.code, refusal.message, refusal.place)
    },
    stop: () => {
      remote[releaseProxy]()
      worker.terminate()
    },
  }
}

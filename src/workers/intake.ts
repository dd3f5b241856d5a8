import { releaseProxy, wrap } from 'comlink'
import type * as intakeTask from './intake-task'
import type { BlockFilesTask, IntakeAnswer, IntakeTask } from './intake-task'

export type { BlockFilesTask, IntakeAnswer, IntakeTask }

/** Reads files off the main thread: one of 20 MB does not freeze the page. */
export interface IntakeWorker {
  readFile(id: number, file: Blob, task: IntakeTask): Promise<IntakeAnswer>
  forgetFile(id: number): Promise<void>
  stop(): void
}

/** Starts a worker that reads files; it lives until `stop`. */
export const startIntakeWorker = (): IntakeWorker => {
  const worker = new Worker(new URL('./intake.worker.ts', import.meta.url), { type: 'module' })
  const remote = wrap<typeof intakeTask>(worker)
  const broken = new Promise<never>((_, reject) => {
    worker.addEventListener('error', (event) => {
      reject(new Error(event.message || 'The part of the program that reads files could not be loaded.'))
    })
  })
  // Without a question under way nobody waits for this.
  broken.catch(() => undefined)
  return {
    readFile: async (id, file, task) => Promise.race([remote.readFile(id, file, task), broken]),
    forgetFile: async (id) => remote.forgetFile(id),
    stop: () => {
      remote[releaseProxy]()
      worker.terminate()
    },
  }
}

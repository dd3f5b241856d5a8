import { spawn, type ChildProcess } from 'node:child_process'
import { join } from 'node:path'
import { repository } from '../../server/start/repository.mjs'
import { cleanEnvironment } from './server-environment'

/** A run of `npm start`'s program. */
export interface Launched {
  readonly child: ChildProcess
  /** Everything it said so far, standard output and standard error. */
  readonly said: () => string
  /** The address of the ready line; fails when the program ends without one. */
  readonly ready: Promise<string>
  /** Exit status once it has ended; null after a signal. */
  readonly ended: Promise<number | null>
}

/** Starts the launcher with nothing of the tests' environment but what is given. */
export function launch(environment: Readonly<Record<string, string>>): Launched {
  const child = spawn(process.execPath, [join(repository, 'server', 'start', 'start.mjs')], {
    env: cleanEnvironment(environment),
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let text = ''
  const ended = new Promise<number | null>((resolve) => child.once('exit', resolve))
  const ready = new Promise<string>((resolve, reject) => {
    const hear = (chunk: Buffer) => {
      text += chunk.toString('utf8')
      const url = /^Beadwright is ready: (\S+)$/m.exec(text)?.[1]
      if (url !== undefined) resolve(url)
    }
    child.stdout.on('data', hear)
    child.stderr.on('data', hear)
    void ended.then((status) => reject(new Error(`It ended with ${String(status)} and said: ${text}`)))
  })
  ready.catch(() => undefined)
  return { child, said: () => text, ready, ended }
}

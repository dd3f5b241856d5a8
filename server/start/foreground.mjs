import { stopRunningPrograms } from './run-program.mjs'
import { StartError } from './start-error.mjs'

/**
 * Runs `work` until it ends or fails, or we are asked to stop; then runs what it registered with `onStop`, last one first, and
 * ends the process: `codeAfterSignal` when asked to, 1 after a failure, else with the exit code that `work` returns.
 *
 * `onStop` is to be called the moment something was started, so that a signal in the middle of the preparations stops it too.
 *
 * @param {(onStop: (close: () => unknown) => void) => Promise<number | void>} work
 */
export async function runInForeground(work, { codeAfterSignal = 0 } = {}) {
  const closers = []
  let stopping = false

  async function stop(code) {
    if (stopping) return
    stopping = true
    stopRunningPrograms()
    let exitCode = code
    // What is registered while we stop (a signal between two steps) is closed in the same loop.
    while (closers.length > 0) {
      try {
        await closers.pop()()
      } catch (error) {
        report(error)
        exitCode = 1
      }
    }
    process.exit(exitCode)
  }

  function stopAsAsked() {
    if (!stopping) console.log('\nStopping.')
    void stop(codeAfterSignal)
  }

  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, stopAsAsked)
  onLossOfParent(stopAsAsked)
  try {
    await stop((await work((close) => closers.push(close))) ?? 0)
  } catch (error) {
    if (!stopping) report(error)
    await stop(1)
  }
}

/** npm runs us in a shell and passes SIGTERM to that shell alone; its end is all we see of it. */
function onLossOfParent(tell) {
  if (!process.env.npm_lifecycle_event) return
  const parent = process.ppid
  setInterval(() => process.ppid !== parent && tell(), 500).unref()
}

/** One plain line for what we foresaw, the whole error for what we did not. */
export function report(error) {
  if (!(error instanceof StartError)) console.error(error)
  else console.error(error.details ? `${error.message}\n\n${error.details}` : error.message)
}

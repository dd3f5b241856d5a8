import { spawn } from 'node:child_process'
import { join } from 'node:path'
import { ensureBuilt } from './build.mjs'
import { ensureChromium } from './chromium.mjs'
import { report, runInForeground } from './foreground.mjs'
import { nodeVersionProblem } from './node-version.mjs'
import { ensurePackages } from './packages.mjs'
import { ensurePostgres } from './postgres-programs.mjs'
import { repository } from './repository.mjs'
import { StartError } from './start-error.mjs'

const CLOSING_LINE = /^\d+ passed, \d+ failed$/

/** `npm test`: everything the tests need, then the tests; arguments go to vitest. The last line is `N passed, N failed`. */
await runInForeground(prepareAndTest, { codeAfterSignal: 130 })

async function prepareAndTest(onStop) {
  try {
    const problem = nodeVersionProblem(process.version)
    if (problem) throw new StartError(problem)
    await ensurePackages(repository)
    if (!process.env.TEST_DATABASE_URL) await ensurePostgres()
    await ensureChromium()
    await ensureBuilt(repository)
  } catch (error) {
    report(error)
    console.log('0 passed, 1 failed')
    return 1
  }
  return runVitest(process.argv.slice(2), onStop)
}

/** Passes the output on and sees to it that a run that broke down without its closing line gets one. */
async function runVitest(args, onStop) {
  const vitest = join(repository, 'node_modules', 'vitest', 'vitest.mjs')
  const child = spawn(process.execPath, [vitest, 'run', ...args], {
    cwd: repository,
    stdio: ['ignore', 'pipe', 'inherit'],
    env: process.stdout.isTTY ? { FORCE_COLOR: '1', ...process.env } : process.env,
  })
  const ended = new Promise((resolve, reject) => {
    child.once('error', reject)
    child.once('close', resolve)
  })
  onStop(async () => {
    child.kill('SIGTERM')
    await ended
  })
  let end = ''
  child.stdout.on('data', (chunk) => {
    process.stdout.write(chunk)
    end = (end + chunk).slice(-200)
  })
  const code = await ended
  if (code !== 0 && !CLOSING_LINE.test(end.trimEnd().split('\n').at(-1))) {
    console.log('\n0 passed, 1 failed')
  }
  return code ?? 1
}

import { spawn } from 'node:child_process'
import { join } from 'node:path'
import { openCluster } from './cluster.mjs'
import { chooseDataFolder, prepareDataFolder } from './data-folder.mjs'
import { databaseUser } from './database-user.mjs'
import { runInForeground } from './foreground.mjs'
import { nextFreePort } from './free-port.mjs'
import { nodeVersionProblem } from './node-version.mjs'
import { ensurePackages } from './packages.mjs'
import { ensurePostgres } from './postgres-programs.mjs'
import { repository } from './repository.mjs'
import { readSettings } from './settings.mjs'
import { StartError } from './start-error.mjs'
import { step } from './step.mjs'

const FIRST_API_PORT = 4310

/**
 * `npm run dev`: the server from its sources, started anew when they change, and Vite's development server before it. The
 * database is one of its own, so that unfinished migrations never meet the data of `npm start`.
 */
await runInForeground(async (onStop) => {
  const problem = nodeVersionProblem(process.version)
  if (problem) throw new StartError(problem)
  const settings = readSettings(process.env)
  await ensurePackages(repository)
  const installed = settings.databaseUrl ? null : await ensurePostgres()
  const user = installed ? databaseUser() : null
  const chosen = chooseDataFolder({ given: settings.dataFolder, repository, user })
  const dataFolder = prepareDataFolder(join(chosen, 'development'), user)
  const cluster = installed && (await openDatabase())
  const apiPort = await nextFreePort(FIRST_API_PORT)
  const env = {
    ...process.env,
    NODE_ENV: 'development',
    BEADWRIGHT_API_PORT: String(apiPort),
    PORT: String(apiPort),
    DATABASE_URL: settings.databaseUrl ?? cluster.url,
    DATA_DIR: dataFolder,
    DEMO: settings.demo,
    MAIL_CATCHER: settings.mailCatcher,
  }
  const vite = join(repository, 'node_modules', 'vite', 'bin', 'vite.js')
  const ends = [
    runUntilStopped('server', ['--watch', '--enable-source-maps', '--import', 'tsx', 'server/index.ts']),
    runUntilStopped('Vite', [vite]),
  ]
  throw new StartError(await Promise.race(ends))

  function openDatabase() {
    return step('Starting the database', () =>
      openCluster({
        folder: join(dataFolder, 'postgres'),
        installed,
        user,
        logFile: join(dataFolder, 'logs', 'postgres.log'),
        onSpawn: onStop,
      }),
    )
  }

  /** In our own process group: Ctrl-C in a terminal reaches it at once, and our own signal after that does no harm. */
  function runUntilStopped(name, args) {
    const child = spawn(process.execPath, args, { cwd: repository, env, stdio: 'inherit' })
    const ended = new Promise((resolve) => {
      child.once('error', (error) => resolve(error.message))
      child.once('close', (code, signal) => resolve(signal ? `signal ${signal}` : `exit code ${code}`))
    })
    onStop(async () => {
      child.kill('SIGTERM')
      await ended
    })
    return ended.then((how) => `The ${name} ended (${how}).`)
  }
})

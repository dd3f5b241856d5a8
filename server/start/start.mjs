import { join } from 'node:path'
import { ensureBuilt } from './build.mjs'
import { openCluster } from './cluster.mjs'
import { chooseDataFolder, isTemporary, prepareDataFolder } from './data-folder.mjs'
import { databaseUser } from './database-user.mjs'
import { runInForeground } from './foreground.mjs'
import { isPortFree, nextFreePort } from './free-port.mjs'
import { isHealthy, takeInstance } from './instance.mjs'
import { nodeVersionProblem } from './node-version.mjs'
import { ensurePackages } from './packages.mjs'
import { ensurePostgres } from './postgres-programs.mjs'
import { repository } from './repository.mjs'
import { startServer, stopProcess } from './server-process.mjs'
import { localUrl, readSettings } from './settings.mjs'
import { StartError } from './start-error.mjs'
import { step } from './step.mjs'
import { waitUntil } from './wait-until.mjs'

/** `npm start`: from a fresh clone to a running Beadwright. */
await runInForeground(async (onStop) => {
  const problem = nodeVersionProblem(process.version)
  if (problem) throw new StartError(problem)
  const settings = readSettings(process.env)
  const installed = settings.databaseUrl ? null : await ensurePostgres()
  const user = installed ? databaseUser() : null
  const dataFolder = prepareDataFolder(
    chooseDataFolder({ given: settings.dataFolder, repository, user }),
    user,
  )
  if (isTemporary(dataFolder)) {
    console.log(`Note: ${dataFolder} lies in a temporary folder, which the system may empty.`)
  }

  const instance = await takeInstance(dataFolder)
  if (instance.url) {
    console.log(`Beadwright already runs at ${instance.url}.`)
    console.log(`Beadwright is ready: ${instance.url}`)
    return
  }
  onStop(instance.release)
  if (instance.orphan) await stopProcess(instance.orphan)

  const port = await choosePort(settings)
  await ensurePackages(repository)
  await ensureBuilt(repository)
  const cluster = installed && (await openDatabase())
  const server = await step('Starting the server', () => openServer())

  const url = localUrl(settings.host, server.port)
  if (!(await waitUntil(() => isHealthy(url), { limit: 10_000, interval: 200 }))) {
    throw new StartError(
      `The server listens at ${url}, but does not reach its database. See ${logFile('server')}`,
    )
  }
  instance.announce({ server: server.owner, url })
  console.log(`Data: ${dataFolder}`)
  if (server.setUpPath) console.log(`First owner: open ${url}${server.setUpPath}`)
  if (settings.mailCatcher === 'on') console.log(`E-mail stays on this machine: ${url}/tray`)
  console.log(`Beadwright is ready: ${url}`)
  await firstToEnd(server, cluster)

  function logFile(name) {
    return join(dataFolder, 'logs', `${name}.log`)
  }

  function openDatabase() {
    return step('Starting the database', () =>
      openCluster({
        folder: join(dataFolder, 'postgres'),
        installed,
        user,
        logFile: logFile('postgres'),
        onSpawn: onStop,
      }),
    )
  }

  function openServer() {
    return startServer({
      root: repository,
      logFile: logFile('server'),
      env: {
        ...process.env,
        NODE_ENV: 'production',
        PORT: String(port),
        DATABASE_URL: settings.databaseUrl ?? cluster.url,
        DATA_DIR: dataFolder,
        DEMO: settings.demo,
        MAIL_CATCHER: settings.mailCatcher,
      },
      onSpawn: (owner) => {
        instance.announce({ server: owner })
        onStop(() => stopProcess(owner))
      },
    })
  }

  async function firstToEnd({ ended }, database) {
    const serverEnd = ended.then((how) => `The server ended (${how}). Its log: ${logFile('server')}`)
    const databaseEnd = waitUntil(() => database && !database.isUp(), { interval: 2000 }).then(
      () => `PostgreSQL ended. Its log: ${logFile('postgres')}`,
    )
    throw new StartError(await Promise.race([serverEnd, databaseEnd]))
  }
})

/** A port that was asked for is taken as it is; the usual one gives way to the next. */
async function choosePort({ port: { number, given }, host }) {
  if (number === 0 || (await isPortFree(number, host))) return number
  if (given) throw new StartError(`Port ${number} is taken by another program: choose another with PORT.`)
  const free = await nextFreePort(number + 1, host)
  console.log(`Port ${number} is taken by another program; using ${free}.`)
  return free
}

import { mkdirSync } from 'node:fs'
import { join } from 'node:path'
import type { TestProject } from 'vitest/node'
import { ensureBuilt } from '../../server/start/build.mjs'
import { repository } from '../../server/start/repository.mjs'
import { startServer } from '../../server/start/server-process.mjs'
import { createDatabase } from './databases'
import { outputFolder } from './output-folder'
import { cleanEnvironment } from './server-environment'

/** The built server with the demo, on a port and a database of its own. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  await ensureBuilt(repository)
  const database = await createDatabase(project.getProvidedContext().databaseUrl, null)
  const dataFolder = join(outputFolder, 'server')
  mkdirSync(dataFolder, { recursive: true })
  try {
    const server = await startServer({
      root: repository,
      logFile: join(dataFolder, 'server.log'),
      env: cleanEnvironment({
        NODE_ENV: 'production',
        PORT: '0',
        DATABASE_URL: database.url,
        DATA_DIR: dataFolder,
        DEMO: 'on',
      }),
    })
    project.provide('baseUrl', `http://127.0.0.1:${server.port}`)
    return async () => {
      await server.stop()
      await database.drop()
    }
  } catch (error) {
    await database.drop()
    throw error
  }
}

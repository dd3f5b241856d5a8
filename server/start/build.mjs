import { mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { hashOfFiles } from './file-hash.mjs'
import { withLock } from './lock-file.mjs'
import { runOrFail } from './run-program.mjs'
import { step } from './step.mjs'

const SOURCES = [
  'index.html',
  'package-lock.json',
  'public',
  'server',
  'shared',
  'src',
  'tsconfig.json',
  'vite.config.ts',
  'vite.server.config.ts',
]

/** Builds dist/client and dist/server when the sources are not those it was last built from; one process at a time. */
export async function ensureBuilt(root) {
  if (buildIsCurrent(root)) return
  await withLock(
    join(root, '.data', 'build.lock'),
    async () => {
      if (!buildIsCurrent(root)) await step('Building the client and the server', () => build(root))
    },
    ({ pid }) => console.log(`Process ${pid} is building; waiting.`),
  )
}

/** Whether dist was built to its end from the sources as they are now. */
export function buildIsCurrent(root) {
  const parts = ['dist/client/index.html', 'dist/server/index.js']
  if (parts.some((part) => !statSync(join(root, part), { throwIfNoEntry: false }))) return false
  try {
    return readFileSync(stampFile(root), 'utf8') === hashOfFiles(root, SOURCES)
  } catch {
    return false
  }
}

async function build(root) {
  rmSync(stampFile(root), { force: true })
  // Taken before the build: what is edited meanwhile makes the next start build again.
  const hash = hashOfFiles(root, SOURCES)
  const env = { ...process.env, NODE_ENV: 'production' }
  delete env.VITEST
  const vite = (...args) => [join(root, 'node_modules', 'vite', 'bin', 'vite.js'), 'build', ...args]
  await Promise.all([
    runOrFail('The client could not be built.', process.execPath, vite(), { cwd: root, env }),
    runOrFail('The server could not be built.', process.execPath, vite('-c', 'vite.server.config.ts'), {
      cwd: root,
      env,
    }),
  ])
  mkdirSync(join(root, 'dist'), { recursive: true })
  writeFileSync(stampFile(root), hash)
}

function stampFile(root) {
  return join(root, 'dist', 'built-from')
}

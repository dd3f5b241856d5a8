import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { withLock } from './lock-file.mjs'
import { runOrFail } from './run-program.mjs'
import { step } from './step.mjs'

/**
 * Whether node_modules holds what package-lock.json asks for, by the record that npm keeps in node_modules and writes as the
 * last thing of an installation: a cut-short one has none, and one made by hand counts as well as ours.
 */
export function packagesAreCurrent(root) {
  const wanted = readPackages(join(root, 'package-lock.json'))
  const installed = readPackages(join(root, 'node_modules', '.package-lock.json'))
  if (!wanted || !installed) return false
  for (const [path, entry] of Object.entries(wanted)) {
    if (path === '') continue
    const present = installed[path]
    if (!present && (entry.optional || entry.devOptional)) continue // made for another system
    if (present?.version !== entry.version || present.integrity !== entry.integrity) return false
  }
  return Object.keys(installed).every((path) => path in wanted)
}

/** Runs `npm ci` when node_modules is missing, cut short or older than the lock; one process at a time. */
export async function ensurePackages(root) {
  if (packagesAreCurrent(root)) return
  await withLock(
    join(root, '.data', 'packages.lock'),
    async () => {
      if (packagesAreCurrent(root)) return
      await step('Installing the packages (npm ci)', () =>
        // vite is a development package, and the build needs it whatever NODE_ENV says.
        runOrFail('npm ci failed.', 'npm', ['ci', '--include=dev', '--no-progress'], { cwd: root }),
      )
    },
    ({ pid }) => console.log(`Process ${pid} is installing the packages; waiting.`),
  )
}

function readPackages(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8')).packages
  } catch {
    return null
  }
}

import { spawnSync } from 'node:child_process'
import { readFileSync } from 'node:fs'

/**
 * When the process `pid` began, as a text to compare; null when there is no such process or it only waits to be buried.
 * A number alone does not name a process: the system hands it out again, and after a restart from the beginning.
 */
export function processStart(pid) {
  if (!Number.isInteger(pid) || pid < 1) return null
  return process.platform === 'linux' ? linuxProcessStart(pid) : otherProcessStart(pid)
}

/** This process, in the form that lock files keep. */
export function thisProcess() {
  return { pid: process.pid, started: processStart(process.pid) }
}

/** Whether the process that a lock file names still runs. */
export function isRunning(owner) {
  return Boolean(owner?.started) && processStart(owner.pid) === owner.started
}

function linuxProcessStart(pid) {
  let stat
  try {
    stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
  } catch {
    return null
  }
  // The second field is the program's name in brackets and may itself hold blanks and brackets.
  const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ')
  const [state, ticksSinceBoot] = [fields[0], fields[19]]
  if (state === 'Z' || state === 'X') return null
  return `${readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim()} ${ticksSinceBoot}`
}

function otherProcessStart(pid) {
  const { stdout } = spawnSync('ps', ['-o', 'lstart=', '-p', String(pid)], {
    encoding: 'utf8',
    env: { ...process.env, LC_ALL: 'C' },
  })
  return stdout?.trim() || null
}

import type { ProcessOwner } from './process-identity.mjs'

export interface ServerOptions {
  readonly root: string
  readonly env: Readonly<Record<string, string | undefined>>
  readonly logFile: string
  readonly onSpawn?: (owner: ProcessOwner) => void
}
export interface RunningServer {
  readonly port: number
  readonly setUpPath: string | null
  readonly owner: ProcessOwner
  readonly ended: Promise<string>
  readonly stop: () => Promise<void>
}
export function startServer(options: ServerOptions): Promise<RunningServer>
export function stopProcess(owner: ProcessOwner): Promise<void>

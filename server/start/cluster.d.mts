import type { DatabaseUser } from './database-user.mjs'
import type { PostgresPrograms } from './postgres-programs.mjs'

export interface ClusterOptions {
  readonly folder: string
  readonly installed: readonly PostgresPrograms[]
  readonly user: DatabaseUser | null
  readonly logFile: string
  readonly fast?: boolean
  readonly onSpawn?: (stop: () => Promise<void>) => void
}
export interface Cluster {
  readonly url: string
  readonly superuserUrl: string
  readonly pid: number
  readonly isUp: () => boolean
  readonly close: () => Promise<void>
}
export function openCluster(options: ClusterOptions): Promise<Cluster>

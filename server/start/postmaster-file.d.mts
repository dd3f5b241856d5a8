export interface PostmasterFile {
  readonly pid: number
  readonly port: number
  readonly ready: boolean
}
export function readPostmasterFile(dataDirectory: string): PostmasterFile | null
export function isPostgresOf(dataDirectory: string, pid: number): boolean
export function postgresProcessesOf(dataDirectory: string): number[]

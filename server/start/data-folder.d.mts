import type { DatabaseUser } from './database-user.mjs'

export interface DataFolderChoice {
  readonly given: string | null
  readonly repository: string
  readonly user: DatabaseUser | null
  readonly environment?: Readonly<Record<string, string | undefined>>
}
export function chooseDataFolder(choice: DataFolderChoice): string
export function prepareDataFolder(folder: string, user: DatabaseUser | null): string
export function isTemporary(folder: string): boolean

export interface DatabaseUser {
  readonly uid: number
  readonly gid: number
}
export function databaseUser(): DatabaseUser | null
export function canEnter(folder: string, user: DatabaseUser): boolean

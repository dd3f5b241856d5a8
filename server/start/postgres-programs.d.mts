export interface PostgresPrograms {
  readonly folder: string
  readonly major: number
}
export function findPostgres(): PostgresPrograms[]
export function ensurePostgres(): Promise<PostgresPrograms[]>

export interface Settings {
  readonly port: { readonly number: number; readonly given: boolean }
  readonly host: string
  readonly databaseUrl: string | null
  readonly dataFolder: string | null
  readonly demo: 'on' | 'off'
  readonly mailCatcher: 'on' | 'off'
}
export function readSettings(environment: Readonly<Record<string, string | undefined>>): Settings
export function localUrl(host: string, port: number): string

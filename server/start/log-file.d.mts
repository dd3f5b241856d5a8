export interface OpenedLog {
  readonly descriptor: number
  readonly written: () => string
}
export function openLog(path: string): OpenedLog

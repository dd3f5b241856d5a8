export interface ProcessOwner {
  readonly pid: number
  readonly started: string | null
}
export function processStart(pid: number): string | null
export function thisProcess(): ProcessOwner
export function isRunning(owner: ProcessOwner | null): boolean

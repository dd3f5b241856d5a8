export function isPortFree(port: number, host?: string): Promise<boolean>
export function nextFreePort(from: number, host?: string): Promise<number>

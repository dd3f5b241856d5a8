export function ensureBuilt(root: string): Promise<void>
export function buildIsCurrent(root: string): boolean

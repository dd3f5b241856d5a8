export function packagesAreCurrent(root: string): boolean
export function ensurePackages(root: string): Promise<void>

import type { ProcessOwner } from './process-identity.mjs'

export type LockAttempt =
  | { readonly holder: null; readonly release: () => void }
  | { readonly holder: ProcessOwner; readonly release?: undefined }
export function takeLock(path: string): LockAttempt
export function withLock<Result>(
  path: string,
  work: () => Promise<Result> | Result,
  onWait?: (holder: ProcessOwner) => void,
): Promise<Result>
export function readOwner(path: string): ProcessOwner | null

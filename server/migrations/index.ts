import { Foundation1764547200000 } from './1764547200000-foundation'

/** In the order of their time stamps. */
export const migrations = [Foundation1764547200000]

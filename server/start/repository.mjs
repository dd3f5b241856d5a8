import { realpathSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

/** The folder of this clone, links resolved. */
export const repository = realpathSync(fileURLToPath(new URL('../..', import.meta.url)))

import { join } from 'node:path'
import { repository } from '../../server/start/repository.mjs'

/** What tests leave to look at: screenshots, the server's log. Never committed. */
export const outputFolder = join(repository, 'node_modules', '.cache', 'beadwright-tests')

import type { TableQuery } from '@shared/contracts/potential'
import { apiUrl, http, type TextFile } from './http'

/** Address of one table as a file; follow it to download. */
export const tableUrl = (termId: string, query: TableQuery): string =>
  apiUrl(`/terms/${termId}/table`, { ...query })

/** Address of all tables of a mapping at one state point as one archive. */
export const tablesArchiveUrl = (mappingId: string, query: TableQuery): string =>
  apiUrl(`/mappings/${mappingId}/tables.zip`, { ...query })

/** One table as a file, exactly as the download has it. */
export const readTable = (termId: string, query: TableQuery, signal?: AbortSignal): Promise<TextFile> =>
  http.textFile(`/terms/${termId}/table`, { query: { ...query }, signal })

import type { TableQuery } from '@shared/contracts/potential'
import { apiUrl, http } from './http'

/** Address of one table as a file; follow it to download. */
export const tableUrl = (termId: string, query: TableQuery): string =>
  apiUrl(`/terms/${termId}/table`, { ...query })

/** Address of all tables of a mapping at one state point as one archive. */
export const tablesArchiveUrl = (mappingId: string, query: TableQuery): string =>
  apiUrl(`/mappings/${mappingId}/tables.zip`, { ...query })

/** The text of one table, exactly as the download has it. */
export const readTable = (termId: string, query: TableQuery, signal?: AbortSignal): Promise<string> =>
  http.text(`/terms/${termId}/table`, { query: { ...query }, signal })

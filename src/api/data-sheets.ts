import type { DataSheet } from '@shared/contracts/data-sheet'
import type { Received } from '@shared/contracts/delivery'
import { getRelease } from './hand-overs'
import { apiUrl, http } from './http'

const SHEET = 'data-sheet.json'
const PDF = 'data-sheet.pdf'

/** A data sheet as it was frozen, with what may have happened to its hand-over since. */
export interface OpenedSheet {
  readonly sheet: DataSheet
  readonly withdrawn: { readonly reason: string } | null
  /** Of all files; null where the archive is written anew for each recipient. */
  readonly archiveSha256: string | null
  readonly pdfUrl: string
}

/** The data sheet of a released hand-over. */
export const openSheet = async (handOverId: string): Promise<OpenedSheet> => {
  const files = `/hand-overs/${handOverId}/files`
  const [sheet, { withdrawn, archive }] = await Promise.all([
    http.get<DataSheet>(`${files}/${SHEET}`),
    getRelease(handOverId),
  ])
  return { sheet, withdrawn, archiveSha256: archive.sha256, pdfUrl: apiUrl(`${files}/${PDF}`) }
}

/** The data sheet of a hand-over that somebody was sent a link to. */
export const openReceivedSheet = async (token: string): Promise<OpenedSheet> => {
  const base = `/received/${token}`
  const [sheet, { withdrawn }] = await Promise.all([
    http.get<DataSheet>(`${base}/file`, { query: { path: SHEET } }),
    http.get<Received>(base),
  ])
  return { sheet, withdrawn, archiveSha256: null, pdfUrl: apiUrl(`${base}/file`, { path: PDF }) }
}

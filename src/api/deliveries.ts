import type {
  Deliveries,
  DeliverySend,
  QuestionAsk,
  Received,
  ReceivedEntry,
  ReturnSend,
  ReturnStanding,
} from '@shared/contracts/delivery'
import type { OwnLayout, Written, WritingQuery } from '@shared/contracts/delivery-writing'
import { apiUrl, http, uploadForm } from './http'

/** Recipients of a released hand-over, what they took, asked and sent back. */
export const getDeliveries = (handOverId: string): Promise<Deliveries> =>
  http.get(`/hand-overs/${handOverId}/deliveries`)

export const sendHandOver = (handOverId: string, sending: DeliverySend): Promise<Deliveries> =>
  http.post(`/hand-overs/${handOverId}/deliveries`, { json: sending })

/** A new link; those before end. */
export const sendLinkAgain = (recipientId: string): Promise<Deliveries> =>
  http.post(`/recipients/${recipientId}/send`, { json: {} })

/** Lets the link that is out work for so many days from now. */
export const extendLink = (recipientId: string, days: number): Promise<Deliveries> =>
  http.patch(`/recipients/${recipientId}`, { json: { days } })

export const answerQuestion = (questionId: string, text: string): Promise<Deliveries> =>
  http.post(`/questions/${questionId}/answer`, { json: { text } })

export const settleReturned = (id: string, standing: Exclude<ReturnStanding, 'new'>): Promise<Deliveries> =>
  http.put(`/returned-files/${id}`, { json: { standing } })

/** Address of a file that a recipient sent back. */
export const returnedFileUrl = (id: string): string => apiUrl(`/returned-files/${id}/file`)

/** Ends a link, and what the account sees. */
export const revokeLink = (recipientId: string): Promise<Deliveries> =>
  http.post(`/recipients/${recipientId}/revoke`)

/** The hand-overs that were sent to whoever is signed in. */
export const listReceived = async (): Promise<readonly ReceivedEntry[]> =>
  (await http.get<{ handOvers: readonly ReceivedEntry[] }>('/received')).handOvers

/** What a recipient may do; `base` is /received/TOKEN by link, /hand-overs/ID/received with an account. */
export const receiving = (base: string) => ({
  page: (): Promise<Received> => http.get(base),
  written: (query: WritingQuery, signal?: AbortSignal): Promise<Written> =>
    http.get(`${base}/written`, { query, signal }),
  ownWritten: (own: OwnLayout, signal?: AbortSignal): Promise<Written> =>
    http.post(`${base}/written`, { json: own, signal }),
  archiveUrl: (query: WritingQuery): string => apiUrl(`${base}/archive.zip`, query),
  fileUrl: (path: string, query: WritingQuery): string => apiUrl(`${base}/file`, { path, ...query }),
  ownArchive: (own: OwnLayout): Promise<Blob> => http.written(`${base}/archive.zip`, own),
  ownFile: (own: OwnLayout, path: string): Promise<Blob> => http.written(`${base}/file`, { ...own, path }),
  acknowledge: (name: string): Promise<Received> => http.post(`${base}/acknowledgement`, { json: { name } }),
  ask: (question: QuestionAsk): Promise<Received> => http.post(`${base}/questions`, { json: question }),
  sendBack: (file: File, settings: ReturnSend): Promise<Received> =>
    http.post(`${base}/returned-files`, { form: uploadForm(file, { settings }) }),
})
export type Receiving = ReturnType<typeof receiving>

import type {
  HandOverCreate,
  HandOverUpdate,
  ReviewAsk,
  ReviewDecision,
  ReviewMark,
  WarningAnswer,
  WarningAnswerWrite,
} from '@shared/contracts/hand-over'
import type { HandOver, HandOverDetail, HandOverRelease, Waiting } from '@shared/contracts/hand-over-desk'
import { apiUrl, http } from './http'

/** The hand-overs of a polymer, what changed last first. */
export const listHandOvers = async (polymerId: string): Promise<readonly HandOver[]> =>
  (await http.get<{ handOvers: readonly HandOver[] }>(`/polymers/${polymerId}/hand-overs`)).handOvers

export const createHandOver = (polymerId: string, what: HandOverCreate): Promise<HandOverDetail> =>
  http.post(`/polymers/${polymerId}/hand-overs`, { json: what })

export const getHandOver = (id: string): Promise<HandOverDetail> => http.get(`/hand-overs/${id}`)

export const updateHandOver = (id: string, change: HandOverUpdate): Promise<HandOverDetail> =>
  http.patch(`/hand-overs/${id}`, { json: change })

export const deleteHandOver = (id: string): Promise<undefined> => http.delete(`/hand-overs/${id}`)

/** The file of one table as a release would write it now. */
export const previewTable = (id: string, table: string, signal?: AbortSignal): Promise<{ text: string }> =>
  http.get(`/hand-overs/${id}/preview`, { query: { table }, signal })

export const askReview = (id: string, ask: ReviewAsk): Promise<HandOverDetail> =>
  http.post(`/hand-overs/${id}/review`, { json: ask })

export const takeBack = (id: string, revision: number): Promise<HandOverDetail> =>
  http.post(`/hand-overs/${id}/take-back`, { json: { revision } })

export const decideReview = (id: string, decision: ReviewDecision): Promise<HandOverDetail> =>
  http.post(`/hand-overs/${id}/decision`, { json: decision })

/** Marks a term; null takes the mark away. */
export const markTerm = (id: string, termId: string, mark: ReviewMark | null): Promise<HandOverDetail> =>
  http.put(`/hand-overs/${id}/mark`, { json: { termId, mark } })

export const commentOn = (id: string, termId: string | null, text: string): Promise<HandOverDetail> =>
  http.post(`/hand-overs/${id}/comments`, { json: { termId, text } })

export const releaseHandOver = (id: string, revision: number): Promise<HandOverRelease> =>
  http.post(`/hand-overs/${id}/release`, { json: { revision } })

export const getRelease = (id: string): Promise<HandOverRelease> => http.get(`/hand-overs/${id}/release`)

export const withdrawHandOver = (id: string, revision: number, reason: string): Promise<HandOverRelease> =>
  http.post(`/hand-overs/${id}/withdrawal`, { json: { revision, reason } })

/** Address of all files of a released hand-over. */
export const handOverArchiveUrl = (id: string): string => apiUrl(`/hand-overs/${id}/archive.zip`)

/** Address of one file of a released hand-over. */
export const handOverFileUrl = (id: string, path: string): string =>
  apiUrl(`/hand-overs/${id}/files/${encodeURIComponent(path)}`)

/** What waits for the one who asks. */
export const getWaiting = (groupId: string): Promise<Waiting> => http.get(`/groups/${groupId}/waiting`)

type Answers = { readonly answers: readonly WarningAnswer[] }

/** Why warnings of a saved potential are kept, as far as it still holds. */
export const listAnswers = async (potentialId: string): Promise<readonly WarningAnswer[]> =>
  (await http.get<Answers>(`/potentials/${potentialId}/answers`)).answers

/** Keeps a warning of a saved potential, with the reason. */
export const keepWarning = async (
  potentialId: string,
  answer: WarningAnswerWrite,
): Promise<readonly WarningAnswer[]> =>
  (await http.put<Answers>(`/potentials/${potentialId}/answers`, { json: answer })).answers

/** Keeps a warning of a joint potential, with the reason. */
export const keepJointWarning = async (
  jointDistributionId: string,
  answer: WarningAnswerWrite,
): Promise<readonly WarningAnswer[]> =>
  (await http.put<Answers>(`/joint-distributions/${jointDistributionId}/answers`, { json: answer })).answers

import type { Page } from 'playwright-core'
import type { HandOverDetail } from '@shared/contracts/hand-over-desk'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { Session } from '@shared/contracts/session'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { BOND_SETTINGS, bondFile, DOCUMENT, SMILES } from './job-builder'

/** The API as the person on a page may use it. */
export interface PageApi {
  get<Answer>(path: string): Promise<Answer>
  send<Answer>(method: 'post' | 'put' | 'patch', path: string, body: object): Promise<Answer>
  upload(
    path: string,
    settings: object,
    file: { readonly name: string; readonly text: string },
  ): Promise<void>
}

/** Speaks to the API with the cookies of a page and the token of its session. */
export async function apiOf(page: Page): Promise<PageApi> {
  const { csrfToken } = (await (await page.request.get('/api/session')).json()) as Session
  const headers = { 'X-CSRF-Token': csrfToken }
  const answered = async <Answer>(call: ReturnType<Page['request']['get']>): Promise<Answer> => {
    const response = await call
    if (!response.ok()) throw new Error(`${response.url()}: ${await response.text()}`)
    return (await response.json()) as Answer
  }
  return {
    get: (path) => answered(page.request.get(path)),
    send: (method, path, body) => answered(page.request[method](path, { headers, data: body })),
    upload: async (path, settings, { name, text }) => {
      const file = { name, mimeType: 'text/plain', buffer: Buffer.from(text) }
      await answered(
        page.request.post(path, { headers, multipart: { settings: JSON.stringify(settings), file } }),
      )
    },
  }
}

/** A polymer of the group with a mapping, and one bond with data and a saved potential. */
export async function prepareJob(api: PageApi, groupId: string) {
  const polymer = await api.send<{ id: string }>('post', `/api/groups/${groupId}/polymers`, {
    name: 'polystyrene',
    smiles: SMILES,
  })
  const point = await api.send<{ id: string }>('post', `/api/polymers/${polymer.id}/state-points`, {
    temperature: 400,
    phase: 'melt',
  })
  const mapping = await api.send<Mapping>('post', `/api/polymers/${polymer.id}/mappings`, {
    name: '2-to-1',
    document: DOCUMENT,
  })
  const { terms } = await api.get<{ terms: Term[] }>(`/api/mappings/${mapping.id}/terms`)
  const bondId = terms.find(({ name }) => name === 'A–A')?.id ?? ''
  await api.upload(
    `/api/terms/${bondId}/distributions`,
    { statePointId: point.id, settings: BOND_SETTINGS },
    bondFile('bond A-A.txt'),
  )
  await api.send('put', `/api/terms/${bondId}/potential`, {
    statePointId: point.id,
    revision: null,
    settings: DEFAULT_INVERSION_SETTINGS,
  })
  return { polymerId: polymer.id, statePointId: point.id, mappingId: mapping.id, bondId }
}

/** Meets the checklist of a draft: leaves out what has no data, keeps the warnings of what has, each with a reason. */
export async function meetChecklist(api: PageApi, handOverId: string): Promise<void> {
  const draft = await api.get<HandOverDetail>(`/api/hand-overs/${handOverId}`)
  const leftOut = draft.terms
    .filter(({ state }) => state === 'no data')
    .map(({ id }) => ({ termId: id, reason: 'Not asked for.' }))
  await api.send('patch', `/api/hand-overs/${handOverId}`, {
    revision: draft.revision,
    selection: { version: 1, leftOut, apart: [] },
  })
  for (const { potentialId, warnings } of draft.terms) {
    for (const { code } of warnings) {
      await api.send('put', `/api/potentials/${potentialId}/answers`, { code, reason: 'Looked at.' })
    }
  }
}

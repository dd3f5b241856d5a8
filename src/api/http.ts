import type { ErrorBody, ErrorCode } from '@shared/contracts/error'
import type { Session } from '@shared/contracts/session'

/** Codes the browser adds: no answer at all, or an answer that is not ours. */
export type ClientCode = 'NO_CONNECTION' | 'UNREADABLE_ANSWER'
export type ApiErrorCode = ErrorCode | ClientCode

/** A request that failed: the code to act on, the sentence to show, and what else the server said. */
export class ApiError extends Error {
  override readonly name = 'ApiError'

  constructor(
    readonly status: number,
    readonly body: ErrorBody,
  ) {
    super(body.message)
  }

  get code(): ApiErrorCode {
    return this.body.code as ApiErrorCode
  }

  /** The message for one field of a form, when the server named it. */
  fieldMessage(field: string): string | undefined {
    if (this.body.field === field) return this.body.message
    return this.body.issues?.find((issue) => issue.field === field)?.message
  }
}

let csrfToken = ''
let onSignedOut: () => void = () => undefined

/** The token of the session, sent with every write. */
export const setCsrfToken = (token: string): void => {
  csrfToken = token
}

/** What to do when the server says that nobody is signed in any more. */
export const setSignedOutHandler = (handler: () => void): void => {
  onSignedOut = handler
}

type Query = Record<string, string | number | null | undefined>

/** A path of the API with its query; parts that are null or undefined are left out. */
export const apiUrl = (path: string, query: Query = {}): string => {
  const given = Object.entries(query).flatMap(([key, value]) =>
    value === null || value === undefined ? [] : [[key, String(value)]],
  )
  return given.length === 0 ? `/api${path}` : `/api${path}?${new URLSearchParams(given).toString()}`
}

interface RequestOptions {
  readonly query?: Query
  readonly json?: unknown
  readonly form?: FormData
  readonly signal?: AbortSignal
}

const noConnection = (): ApiError =>
  new ApiError(0, {
    code: 'NO_CONNECTION',
    message: 'The server does not answer. Nothing was changed; try again in a moment.',
  })

const readError = async (response: Response): Promise<ApiError> => {
  try {
    return new ApiError(response.status, (await response.json()) as ErrorBody)
  } catch {
    const message = `The server answered ${response.status} without a reason. Try again in a moment.`
    return new ApiError(response.status, { code: 'UNREADABLE_ANSWER', message })
  }
}

const attempt = async (method: string, path: string, options: RequestOptions): Promise<Response> => {
  const headers: Record<string, string> = { Accept: 'application/json' }
  if (method !== 'GET') headers['X-CSRF-Token'] = csrfToken
  if (options.json !== undefined) headers['Content-Type'] = 'application/json'
  const init: RequestInit = { method, headers, credentials: 'same-origin' }
  if (options.signal) init.signal = options.signal
  if (options.form) init.body = options.form
  else if (options.json !== undefined) init.body = JSON.stringify(options.json)
  try {
    return await fetch(apiUrl(path, options.query), init)
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error
    throw noConnection()
  }
}

/** Signing in or out in another window gives the session a new token; one write may fetch it and try again. */
const renewToken = async (): Promise<void> => {
  const response = await attempt('GET', '/session', {})
  if (!response.ok) throw await readError(response)
  csrfToken = ((await response.json()) as Session).csrfToken
}

const send = async (
  method: string,
  path: string,
  options: RequestOptions,
  mayRenew = true,
): Promise<Response> => {
  const response = await attempt(method, path, options)
  if (response.ok) return response
  const error = await readError(response)
  if (error.code === 'CSRF_TOKEN_INVALID' && mayRenew) {
    await renewToken()
    return send(method, path, options, false)
  }
  if (error.code === 'NOT_SIGNED_IN') onSignedOut()
  throw error
}

const request = async <Answer>(method: string, path: string, options: RequestOptions): Promise<Answer> => {
  const response = await send(method, path, options)
  if (response.status === 204) return undefined as Answer
  return (await response.json()) as Answer
}

/** A text file with the name the server gives it. */
export interface TextFile {
  readonly name: string
  readonly text: string
}

type Read = Pick<RequestOptions, 'query' | 'signal'>
type Write = Pick<RequestOptions, 'query' | 'json' | 'form' | 'signal'>

/** The one door to the API: JSON in and out, errors as ApiError, the CSRF token on every write. */
export const http = {
  get: <Answer>(path: string, options: Read = {}) => request<Answer>('GET', path, options),
  post: <Answer>(path: string, options: Write = {}) => request<Answer>('POST', path, options),
  put: <Answer>(path: string, options: Write = {}) => request<Answer>('PUT', path, options),
  patch: <Answer>(path: string, options: Write = {}) => request<Answer>('PATCH', path, options),
  delete: (path: string, options: Read = {}) => request<undefined>('DELETE', path, options),

  /** As `get`, with null where the API answers 404: a record that may not be there yet. */
  async find<Answer>(path: string, options: Read = {}): Promise<Answer | null> {
    try {
      return await request<Answer>('GET', path, options)
    } catch (error) {
      if (error instanceof ApiError && error.status === 404) return null
      throw error
    }
  },

  /** A text file the API sends, such as a table, with the name it gives it. */
  async textFile(path: string, options: Read = {}): Promise<TextFile> {
    const response = await send('GET', path, options)
    const disposition = response.headers.get('Content-Disposition') ?? ''
    const [, quoted, bare] = /filename=(?:"([^"]+)"|([^;\s]+))/.exec(disposition) ?? []
    return { name: quoted ?? bare ?? '', text: await response.text() }
  },

  /** What the API writes for something that is sent to it, as bytes. */
  async written(path: string, json: unknown): Promise<Blob> {
    return (await send('POST', path, { json })).blob()
  },
}

/** A multipart body: the file, the rest as one JSON field, and any number of further files in fields of their own. */
export const uploadForm = (
  file: File,
  fields: Record<string, unknown>,
  parts: Record<string, readonly File[]> = {},
): FormData => {
  const form = new FormData()
  for (const [name, value] of Object.entries(fields)) {
    form.append(name, typeof value === 'string' ? value : JSON.stringify(value))
  }
  form.append('file', file, file.name)
  for (const [name, files] of Object.entries(parts)) {
    files.forEach((part) => form.append(name, part, part.name))
  }
  return form
}

import type { Express } from 'express'
import request, { type Response } from 'supertest'
import type { z } from 'zod'
import { sessionSchema } from '@shared/contracts/session'

/** A browser as the API sees it: keeps its cookies and sends the token of its session with every write. */
export class ApiClient {
  private readonly agent: ReturnType<typeof request.agent>
  private token = ''

  constructor(app: Express) {
    this.agent = request.agent(app)
  }

  /** Fetches the token of the session, as every page does first. */
  async open(): Promise<z.infer<typeof sessionSchema>> {
    const response = await this.agent.get('/api/session')
    const session = sessionSchema.parse(response.body)
    this.token = session.csrfToken
    return session
  }

  /** Signs in and takes over the new token. */
  async signIn(email: string, password: string): Promise<Response> {
    await this.open()
    const response = await this.post('/api/session', { email, password })
    if (response.status === 200) this.token = sessionSchema.parse(response.body).csrfToken
    return response
  }

  get(path: string): Promise<Response> {
    return this.send('get', path)
  }

  post(path: string, body?: object): Promise<Response> {
    return this.send('post', path, body)
  }

  put(path: string, body?: object): Promise<Response> {
    return this.send('put', path, body)
  }

  patch(path: string, body?: object): Promise<Response> {
    return this.send('patch', path, body)
  }

  delete(path: string): Promise<Response> {
    return this.send('delete', path)
  }

  async send(method: Method, path: string, body?: object): Promise<Response> {
    const call = this.agent[method](path)
    if (method !== 'get') call.set('X-CSRF-Token', this.token)
    return body === undefined ? call : call.send(body)
  }

  /** Sends a file with its settings, and files of its blocks and chains, as the intake does. */
  async upload(
    path: string,
    settings: unknown,
    file: TextFile,
    parts: { readonly blocks?: readonly TextFile[]; readonly chains?: readonly TextFile[] } = {},
  ): Promise<Response> {
    const call = this.agent
      .post(path)
      .set('X-CSRF-Token', this.token)
      .field('settings', JSON.stringify(settings))
      .attach('file', Buffer.from(file.text), file.name)
    for (const [field, files] of Object.entries(parts)) {
      for (const { name, text } of files) call.attach(field, Buffer.from(text), name)
    }
    return call
  }

  /** A request without the token, or with headers of one's own. */
  raw(method: Method, path: string): request.Test {
    return this.agent[method](path)
  }

  /** The token as the page would send it. */
  get csrfToken(): string {
    return this.token
  }
}

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete'

/** A text file to bring in. */
export interface TextFile {
  readonly name: string
  readonly text: string
}

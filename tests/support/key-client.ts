import type { Express } from 'express'
import request, { type Response } from 'supertest'
import type { KeyScope } from '@shared/contracts/key'
import type { ApiServer } from './api-server'
import type { Method, TextFile } from './api-client'

/** A script as the API sees it: no cookie, no token, a key with every request. */
export class KeyClient {
  constructor(
    private readonly app: Express,
    private readonly key: string,
  ) {}

  send(method: Method, path: string, body?: object): Promise<Response> {
    const call = this.raw(method, path)
    return Promise.resolve(body === undefined ? call : call.send(body))
  }

  upload(path: string, settings: unknown, file: TextFile): Promise<Response> {
    const call = this.raw('post', path)
      .field('settings', JSON.stringify(settings))
      .attach('file', Buffer.from(file.text), file.name)
    return Promise.resolve(call)
  }

  /** A request to which more can be added. */
  raw(method: Method, path: string): request.Test {
    return request(this.app)[method](path).set('Authorization', `Bearer ${this.key}`)
  }
}

/** A script with a new key of a person. */
export async function scriptOf(
  { app, services }: ApiServer,
  userId: string,
  scopes: KeyScope[],
  name = 'a script',
): Promise<KeyClient> {
  return new KeyClient(app, (await services.keys.make(userId, { name, scopes, expiresAt: null })).key)
}

import type { DemoSignIn, Session, SetUp, SignIn } from '@shared/contracts/session'
import { http } from './http'

/** Who is signed in, the token for writes, and the demo's people when the demo is on. */
export const getSession = (): Promise<Session> => http.get('/session')

export const signIn = (credentials: SignIn): Promise<unknown> => http.post('/session', { json: credentials })

export const signInDemo = (choice: DemoSignIn): Promise<unknown> =>
  http.post('/session/demo', { json: choice })

export const signOut = (): Promise<undefined> => http.delete('/session')

/** Whether a set-up link still works. */
export const setUpLinkWorks = async (token: string): Promise<boolean> =>
  (await http.find(`/set-up/${encodeURIComponent(token)}`)) !== null

export const setUp = (details: SetUp): Promise<unknown> => http.post('/set-up', { json: details })

import type {
  AccountUpdate,
  JoinNew,
  JoinOffer,
  PasswordChange,
  Reset,
  ResetRequest,
} from '@shared/contracts/people'
import type { Tray } from '@shared/contracts/tray'
import { http } from './http'

const part = encodeURIComponent

/** What an invitation leads to. */
export const getJoinOffer = (token: string): Promise<JoinOffer> => http.get(`/join/${part(token)}`)

export const joinNew = (token: string, details: JoinNew): Promise<unknown> =>
  http.post(`/join/${part(token)}/account`, { json: details })

export const join = (token: string): Promise<unknown> => http.post(`/join/${part(token)}`)

export const askForReset = (request: ResetRequest): Promise<unknown> =>
  http.post('/password-resets', { json: request })

/** Whether a link for a new password still works. */
export const resetLinkWorks = async (token: string): Promise<boolean> =>
  (await http.find(`/password-resets/${part(token)}`)) !== null

export const resetPassword = (token: string, reset: Reset): Promise<unknown> =>
  http.post(`/password-resets/${part(token)}`, { json: reset })

export const updateAccount = (change: AccountUpdate): Promise<unknown> =>
  http.patch('/account', { json: change })

export const changePassword = (change: PasswordChange): Promise<unknown> =>
  http.post('/account/password', { json: change })

/** Remembers whose work is shown. */
export const chooseGroup = (groupId: string): Promise<unknown> =>
  http.put('/account/current-group', { json: { groupId } })

/** Mails that stayed on this machine; null where mails go out. */
export const findTray = (): Promise<Tray | null> => http.find('/tray')

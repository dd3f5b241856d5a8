import type { ApiKey, ApiKeyCreate, ApiKeyMade } from '@shared/contracts/key'
import { http } from './http'

/** One's own keys, the newest first, revoked ones too. */
export const listKeys = async (): Promise<ApiKey[]> => (await http.get<{ keys: ApiKey[] }>('/keys')).keys

/** Makes a key; the answer is the only one that ever shows it. */
export const makeKey = (values: ApiKeyCreate): Promise<ApiKeyMade> => http.post('/keys', { json: values })

export const revokeKey = (id: string): Promise<undefined> => http.delete(`/keys/${id}`)

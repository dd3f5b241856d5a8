import { computed, ref, shallowRef, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { ApiKey, ApiKeyMade } from '@shared/contracts/key'
import { ApiError } from '@/api/http'
import { listKeys, revokeKey } from '@/api/keys'

/** Whether a key opens anything at a moment. */
export const keyWorks = ({ revokedAt, expiresAt }: ApiKey, now: number): boolean =>
  revokedAt === null && (expiresAt === null || Date.parse(expiresAt) > now)

/** One's own API keys: those that work, those that do not any more, and the one just made with its secret. */
export function useKeys(): {
  working: ComputedRef<readonly ApiKey[]>
  ended: ComputedRef<readonly ApiKey[]>
  loaded: Ref<boolean>
  failure: ShallowRef<ApiError | null>
  made: ShallowRef<ApiKeyMade | null>
  load: () => Promise<void>
  take: (key: ApiKeyMade) => void
  revoke: (key: ApiKey) => Promise<void>
} {
  const keys = shallowRef<readonly ApiKey[]>([])
  const loaded = ref(false)
  const failure = shallowRef<ApiError | null>(null)
  const made = shallowRef<ApiKeyMade | null>(null)
  const askedAt = ref(0)

  const working = computed(() => keys.value.filter((key) => keyWorks(key, askedAt.value)))
  const ended = computed(() => keys.value.filter((key) => !keyWorks(key, askedAt.value)))

  const load = async (): Promise<void> => {
    failure.value = null
    try {
      keys.value = await listKeys()
      askedAt.value = Date.now()
      loaded.value = true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      failure.value = error
    }
  }
  const take = (key: ApiKeyMade): void => {
    made.value = key
    keys.value = [key.made, ...keys.value]
  }
  const revoke = async ({ id }: ApiKey): Promise<void> => {
    await revokeKey(id)
    if (made.value?.made.id === id) made.value = null
    await load()
  }

  return { working, ended, loaded, failure, made, load, take, revoke }
}

import { useRouter } from 'vue-router'
import { ApiError } from '@/api/http'
import { useNoticesStore } from '@/stores/notices'
import { useSessionStore } from '@/stores/session'
import { useWorkbenchStore } from '@/stores/workbench'

/** Signs out, clears the bench and opens the sign-in; says so when the server did not hear it. */
export function useSignOut(): () => Promise<void> {
  const router = useRouter()
  const session = useSessionStore()
  const workbench = useWorkbenchStore()
  const notices = useNoticesStore()

  return async () => {
    try {
      await session.signOut()
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      notices.say(`You are still signed in. ${error.message}`)
      return
    }
    workbench.clear()
    await router.push({ name: 'sign-in' })
  }
}

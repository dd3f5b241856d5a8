import type { Router } from 'vue-router'
import { setSignedOutHandler } from '@/api/http'
import { useSessionStore } from '@/stores/session'

/** The page asked for before sign-in, if it is one of ours: an address from outside must not send people elsewhere. */
export const safeReturnPath = (next: unknown): string =>
  typeof next === 'string' && /^\/(?![/\\])/.test(next) ? next : '/'

/** Nobody but the open pages without a session; afterwards back to the page that was asked for. */
export const installGuards = (router: Router): void => {
  router.beforeEach(async (to) => {
    const session = useSessionStore()
    if (!session.loaded) await session.load()
    if (to.meta.open !== true && !session.user) return { name: 'sign-in', query: { next: to.fullPath } }
    if (to.name === 'sign-in' && session.user) return safeReturnPath(to.query['next'])
    // Sign-in fetches contracts when it is sent; every other page may check by them from the start.
    if (to.name !== 'sign-in') await import('@/plugins/zod')
    return true
  })
  router.afterEach((to) => {
    document.title = `${to.meta.title} · Beadwright`
  })
  setSignedOutHandler(() => {
    useSessionStore().forget()
    const here = router.currentRoute.value
    if (here.meta.open === true) return
    void router.push({ name: 'sign-in', query: { next: here.fullPath } })
  })
}

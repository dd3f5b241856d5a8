import { createPinia, setActivePinia, type Pinia } from 'pinia'
import { flushPromises, mount, type VueWrapper } from '@vue/test-utils'
import { vi } from 'vitest'
import { h, type Component } from 'vue'
import { createMemoryHistory, createRouter, RouterView, type Router } from 'vue-router'
import { VApp } from 'vuetify/components'
import type { Role } from '@shared/contracts/common'
import { HOUSE_DEFAULTS } from '@shared/contracts/group'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { useSessionStore } from '@/stores/session'

const nothing = { template: '<p />' }

/** The addresses of the product, for links; the view under test stands at its own. */
const ADDRESSES: Readonly<Record<string, string>> = {
  'front-desk': '/',
  'sign-in': '/sign-in',
  account: '/account',
  'set-up': '/set-up/:token',
  join: '/join/:token',
  forgot: '/forgot',
  reset: '/reset/:token',
  tray: '/tray',
  received: '/received/:token',
  group: '/groups/:groupId',
  'group-members': '/groups/:groupId/members',
  'group-invitations': '/groups/:groupId/invitations',
  'group-defaults': '/groups/:groupId/defaults',
  'group-history': '/groups/:groupId/history',
  'group-layouts': '/groups/:groupId/layouts/:layoutId?',
  'polymer-new': '/polymers/new',
  polymer: '/polymers/:polymerId',
  comparison: '/polymers/:polymerId/comparison',
  'hand-overs': '/polymers/:polymerId/hand-overs',
  'hand-over': '/hand-overs/:handOverId',
  'data-sheet': '/hand-overs/:handOverId/sheet',
  'received-sheet': '/received/:token/sheet',
  mapping: '/polymers/:polymerId/mappings/:mappingId/mapping',
  'mapping-print': '/polymers/:polymerId/mappings/:mappingId/mapping/print',
  intake: '/polymers/:polymerId/mappings/:mappingId/intake',
  bench: '/polymers/:polymerId/mappings/:mappingId/bench/:termId?',
  correlation: '/polymers/:polymerId/mappings/:mappingId/correlation/:pair?',
  tables: '/polymers/:polymerId/mappings/:mappingId/tables',
}

interface Stage {
  readonly wrapper: VueWrapper
  readonly router: Router
  readonly pinia: Pinia
}

/** A fresh store of stores, with someone signed in unless the role is null. */
export const freshStores = (role: Role | null = 'modeller'): Pinia => {
  localStorage.clear()
  const pinia = createPinia()
  setActivePinia(pinia)
  const session = useSessionStore()
  session.loaded = true
  if (role !== null) {
    const memberships = [
      { groupId: 'group', groupName: 'Adhesives group', role, demo: false, defaults: HOUSE_DEFAULTS },
    ]
    session.user = {
      id: 'me',
      name: 'Mo Modeller',
      email: 'mo@example.org',
      memberships,
      currentGroupId: 'group',
    }
  }
  return pinia
}

/** Shows a view at one of the product's addresses, in the real theme, attached to the document. Stores come from `freshStores`. */
export const mountAt = async (
  name: string,
  path: string,
  view: Component,
  pinia: Pinia = freshStores(),
): Promise<Stage> => {
  const router = createRouter({
    history: createMemoryHistory(),
    routes: Object.entries(ADDRESSES).map(([each, address]) => ({
      name: each,
      path: address,
      component: each === name ? view : nothing,
    })),
  })
  await router.push(path)
  const wrapper = mount(
    { render: () => h(VApp, () => h(RouterView)) },
    { global: { plugins: [pinia, createBeadwrightVuetify(), router] }, attachTo: document.body },
  )
  await flushPromises()
  return { wrapper, router, pinia }
}

/** The text on the page, dialogs and menus included, with blanks as one. */
export const pageText = (): string => (document.body.textContent ?? '').replace(/\s+/g, ' ').trim()

/** A button or link anywhere on the page, by its accessible name. */
export const control = (name: string | RegExp): HTMLElement => {
  const found = [...document.body.querySelectorAll<HTMLElement>('button, a, [role=button]')].filter(
    (each) => {
      const own = (each.getAttribute('aria-label') ?? each.textContent ?? '').replace(/\s+/g, ' ').trim()
      return typeof name === 'string' ? own === name : name.test(own)
    },
  )
  if (found.length === 0) throw new Error(`No control is called ${String(name)}`)
  return found[found.length - 1]
}

/** The open dialog, which holds the focus, or the page. */
const foreground = (): Element =>
  document.body.querySelector('.v-overlay--active[role="dialog"]') ?? document.body

/** The field under a label, in the foreground. */
export const field = (label: string | RegExp): HTMLInputElement => {
  const labels = [...foreground().querySelectorAll('label')].filter((each) => {
    const own = (each.textContent ?? '').replace(/\s+/g, ' ').trim()
    return typeof label === 'string' ? own === label : label.test(own)
  })
  const found = labels.map((each) => document.getElementById(each.htmlFor)).filter((each) => each !== null)
  if (found.length === 0) throw new Error(`No field is called ${String(label)}`)
  return found[found.length - 1] as HTMLInputElement
}

export const click = async (name: string | RegExp): Promise<void> => {
  control(name).click()
  await flushPromises()
}

export const type = async (label: string | RegExp, text: string): Promise<void> => {
  const target = field(label)
  target.value = text
  target.dispatchEvent(new Event('input', { bubbles: true }))
  target.dispatchEvent(new Event('change', { bubbles: true }))
  await flushPromises()
}

export const submit = async (): Promise<void> => {
  const forms = foreground().querySelectorAll('form')
  forms[forms.length - 1].dispatchEvent(new Event('submit', { bubbles: true, cancelable: true }))
  await flushPromises()
}

interface FakeAnswer {
  readonly status?: number
  readonly body?: unknown
  readonly text?: string
  readonly headers?: Record<string, string>
}

/** One request as the browser would have sent it. */
export interface SentRequest {
  readonly method: string
  readonly path: string
  readonly headers: Record<string, string>
  readonly body: unknown
}

/**
 * Answers fetch by "METHOD /path?query" (or without the query). A list gives one answer after the other, the last again and
 * again; what is not named answers 404.
 */
export const fakeApi = (answers: Record<string, FakeAnswer | readonly FakeAnswer[]>): SentRequest[] => {
  const sent: SentRequest[] = []
  const asked = new Map<string, number>()
  vi.stubGlobal('fetch', (path: string, init: RequestInit) => {
    const method = init.method ?? 'GET'
    const body = typeof init.body === 'string' ? (JSON.parse(init.body) as unknown) : init.body
    sent.push({ method, path, headers: init.headers as Record<string, string>, body })
    const key = [`${method} ${path}`, `${method} ${path.split('?')[0]}`].find((each) => each in answers)
    const given =
      key === undefined ? { status: 404, body: { code: 'NOT_FOUND', message: 'gone' } } : answers[key]
    const list = Array.isArray(given) ? (given as readonly FakeAnswer[]) : [given as FakeAnswer]
    const count = asked.get(key ?? '') ?? 0
    asked.set(key ?? '', count + 1)
    const { status = 200, body: answer, text, headers } = list[Math.min(count, list.length - 1)]
    const content = status === 204 ? null : (text ?? JSON.stringify(answer ?? {}))
    return Promise.resolve(new Response(content, { status, headers }))
  })
  return sent
}

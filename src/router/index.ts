import {
  createRouter,
  createWebHistory,
  type Router,
  type RouteLocation,
  type RouteRecordRaw,
} from 'vue-router'
import { installGuards } from './guards'

const views = import.meta.glob<{ default: object }>('../views/*View.vue')
const view = (name: string) => views[`../views/${name}View.vue`] ?? views['../views/NotFoundView.vue']

declare module 'vue-router' {
  interface RouteMeta {
    /** Stands after the product's name in the window title. */
    title: string
    /** Open to people who are not signed in. */
    open?: boolean
  }
}

const workbenchRooms: RouteRecordRaw[] = [
  {
    path: '',
    name: 'workbench',
    redirect: (to: RouteLocation) => ({ name: 'mapping', params: to.params, query: to.query }),
  },
  { path: 'mapping', name: 'mapping', component: view('Mapping'), meta: { title: 'Mapping' } },
  { path: 'intake', name: 'intake', component: view('Intake'), meta: { title: 'Intake' } },
  { path: 'bench/:termId?', name: 'bench', component: view('Bench'), meta: { title: 'Bench' } },
  {
    path: 'correlation/:pair?',
    name: 'correlation',
    component: view('Correlation'),
    meta: { title: 'Correlation' },
  },
  { path: 'tables', name: 'tables', component: view('Tables'), meta: { title: 'Tables' } },
]

const routes: RouteRecordRaw[] = [
  { path: '/', name: 'front-desk', component: view('FrontDesk'), meta: { title: 'Front desk' } },
  { path: '/sign-in', name: 'sign-in', component: view('SignIn'), meta: { title: 'Sign in', open: true } },
  {
    path: '/set-up/:token',
    name: 'set-up',
    component: view('SetUp'),
    meta: { title: 'Set up', open: true },
  },
  {
    path: '/polymers/new',
    name: 'polymer-new',
    component: view('PolymerNew'),
    meta: { title: 'New polymer' },
  },
  { path: '/polymers/:polymerId', name: 'polymer', component: view('Polymer'), meta: { title: 'Polymer' } },
  {
    path: '/polymers/:polymerId/mappings/:mappingId',
    component: view('Workbench'),
    meta: { title: 'Mapping' },
    children: workbenchRooms,
  },
  {
    path: '/:path(.*)*',
    name: 'not-found',
    component: view('NotFound'),
    meta: { title: 'Not found', open: true },
  },
]

/** The rooms and their addresses; every view loads when it is first visited. */
export const createBeadwrightRouter = (): Router => {
  const router = createRouter({
    history: createWebHistory(),
    routes,
    scrollBehavior: (to, from, saved) => saved ?? (to.path === from.path ? false : { top: 0 }),
  })
  installGuards(router)
  return router
}

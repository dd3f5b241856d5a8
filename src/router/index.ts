import {
  createRouter,
  createWebHistory,
  type Router,
  type RouteLocation,
  type RouteRecordRaw,
} from 'vue-router'
import { groupRoutes } from './group-sections'
import { installGuards } from './guards'

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
  {
    path: 'mapping',
    name: 'mapping',
    component: () => import('@/views/MappingView.vue'),
    meta: { title: 'Mapping' },
  },
  {
    path: 'mapping/print',
    name: 'mapping-print',
    component: () => import('@/views/MappingPrintView.vue'),
    meta: { title: 'Mapping on paper' },
  },
  {
    path: 'intake',
    name: 'intake',
    component: () => import('@/views/IntakeView.vue'),
    meta: { title: 'Intake' },
  },
  {
    path: 'bench/:termId?',
    name: 'bench',
    component: () => import('@/views/BenchView.vue'),
    meta: { title: 'Bench' },
  },
  {
    path: 'correlation/:pair?',
    name: 'correlation',
    component: () => import('@/views/CorrelationView.vue'),
    meta: { title: 'Correlation' },
  },
  {
    path: 'tables',
    name: 'tables',
    component: () => import('@/views/TablesView.vue'),
    meta: { title: 'Tables' },
  },
]

const routes: RouteRecordRaw[] = [
  {
    path: '/',
    name: 'front-desk',
    component: () => import('@/views/FrontDeskView.vue'),
    meta: { title: 'Front desk' },
  },
  {
    path: '/sign-in',
    name: 'sign-in',
    component: () => import('@/views/SignInView.vue'),
    meta: { title: 'Sign in', open: true },
  },
  {
    path: '/set-up/:token',
    name: 'set-up',
    component: () => import('@/views/SetUpView.vue'),
    meta: { title: 'Set up', open: true },
  },
  {
    path: '/join/:token',
    name: 'join',
    component: () => import('@/views/JoinView.vue'),
    meta: { title: 'Join', open: true },
  },
  {
    path: '/forgot',
    name: 'forgot',
    component: () => import('@/views/ForgotView.vue'),
    meta: { title: 'Forgotten password', open: true },
  },
  {
    path: '/reset/:token',
    name: 'reset',
    component: () => import('@/views/ResetView.vue'),
    meta: { title: 'New password', open: true },
  },
  {
    path: '/received/:token',
    name: 'received',
    component: () => import('@/views/ReceivedView.vue'),
    meta: { title: 'Hand-over', open: true },
  },
  {
    path: '/received/:token/sheet',
    name: 'received-sheet',
    component: () => import('@/views/DataSheetView.vue'),
    meta: { title: 'Data sheet', open: true },
  },
  {
    path: '/tray',
    name: 'tray',
    component: () => import('@/views/TrayView.vue'),
    meta: { title: 'Tray', open: true },
  },
  {
    path: '/polymers/new',
    name: 'polymer-new',
    component: () => import('@/views/PolymerNewView.vue'),
    meta: { title: 'New polymer' },
  },
  {
    path: '/polymers/:polymerId',
    name: 'polymer',
    component: () => import('@/views/PolymerView.vue'),
    meta: { title: 'Polymer' },
  },
  {
    path: '/polymers/:polymerId/hand-overs',
    name: 'hand-overs',
    component: () => import('@/views/HandOversView.vue'),
    meta: { title: 'Hand-overs' },
  },
  {
    path: '/hand-overs/:handOverId',
    name: 'hand-over',
    component: () => import('@/views/HandOverView.vue'),
    meta: { title: 'Hand-over' },
  },
  {
    path: '/hand-overs/:handOverId/sheet',
    name: 'data-sheet',
    component: () => import('@/views/DataSheetView.vue'),
    meta: { title: 'Data sheet' },
  },
  {
    path: '/polymers/:polymerId/comparison',
    name: 'comparison',
    component: () => import('@/views/ComparisonView.vue'),
    meta: { title: 'Mappings side by side' },
  },
  {
    path: '/polymers/:polymerId/mappings/:mappingId',
    component: () => import('@/views/WorkbenchView.vue'),
    meta: { title: 'Mapping' },
    children: workbenchRooms,
  },
  {
    path: '/groups/:groupId',
    component: () => import('@/views/GroupView.vue'),
    meta: { title: 'Group' },
    children: groupRoutes,
  },
  {
    path: '/account',
    name: 'account',
    component: () => import('@/views/AccountView.vue'),
    meta: { title: 'Your account' },
  },
  {
    path: '/:path(.*)*',
    name: 'not-found',
    component: () => import('@/views/NotFoundView.vue'),
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

import type {
  LayoutCreate,
  LayoutExample,
  LayoutList,
  LayoutPreview,
  LayoutPreviewAsk,
  LayoutRef,
  LayoutSave,
  LayoutVersions,
  StoredLayout,
} from '@shared/contracts/layout'
import { apiUrl, http } from './http'

export const listLayouts = (groupId: string): Promise<LayoutList> => http.get(`/groups/${groupId}/layouts`)

export const listLayoutExamples = async (groupId: string): Promise<LayoutExample[]> =>
  (await http.get<{ examples: LayoutExample[] }>(`/groups/${groupId}/layout-examples`)).examples

export const createLayout = (groupId: string, layout: LayoutCreate): Promise<StoredLayout> =>
  http.post(`/groups/${groupId}/layouts`, { json: layout })

/** A layout in its newest version, or in the one given. */
export const getLayout = (layoutId: string, version?: number): Promise<StoredLayout> =>
  http.get(`/layouts/${layoutId}`, { query: { version } })

export const listLayoutVersions = async (layoutId: string): Promise<LayoutVersions['versions']> =>
  (await http.get<LayoutVersions>(`/layouts/${layoutId}/versions`)).versions

/** 409 CONFLICT with the newest version in the error's `details` when someone else saved in between. */
export const saveLayout = (layoutId: string, change: LayoutSave): Promise<StoredLayout> =>
  http.put(`/layouts/${layoutId}`, { json: change })

export const copyLayout = (layoutId: string, name: string): Promise<StoredLayout> =>
  http.post(`/layouts/${layoutId}/copy`, { json: { name } })

export const archiveLayout = (layoutId: string): Promise<StoredLayout> =>
  http.post(`/layouts/${layoutId}/archive`, { json: {} })

export const restoreLayout = (layoutId: string): Promise<StoredLayout> =>
  http.post(`/layouts/${layoutId}/restore`, { json: {} })

export const setDefaultLayout = (groupId: string, layout: LayoutRef): Promise<LayoutList> =>
  http.put(`/groups/${groupId}/default-layout`, { json: { layout } })

/** Address of a layout as a file; follow it to download. */
export const layoutFileUrl = (layoutId: string): string => apiUrl(`/layouts/${layoutId}/file`)

export const previewLayout = (termId: string, ask: LayoutPreviewAsk): Promise<LayoutPreview> =>
  http.post(`/terms/${termId}/layout-preview`, { json: ask })

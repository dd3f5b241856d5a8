import type { EntityManager } from 'typeorm'
import {
  builtInKeySchema,
  type LayoutDocument,
  layoutDocumentSchema,
  type LayoutRef,
} from '../../shared/contracts/layout'
import {
  BUILT_IN_LAYOUTS,
  builtInLayout,
  type BuiltInKey,
  DEFAULT_BUILT_IN,
  type Layout as LayoutBody,
  type LayoutUnits,
} from '../../shared/layouts'
import { LayoutVersion } from '../entities/layout-version.entity'
import { Layout } from '../entities/layout.entity'
import { notFound } from '../errors/http-error'
import type { TableWriting } from './table-file'

/** A layout as something is written in it. */
export interface FoundLayout {
  readonly name: string
  /** null for one of the house. */
  readonly version: number | null
  readonly document: LayoutBody
}

/**
 * The layout that a reference names, in its newest version or in the one given; archived ones as well, since what was written
 * with them can be written again.
 *
 * @param units what a layout of the house is made for; one of the group has its own
 * @throws {HttpError} NOT_FOUND with the field
 */
export async function findLayout(
  manager: EntityManager,
  groupId: string,
  { layout, version }: { readonly layout: LayoutRef; readonly version?: number },
  units: LayoutUnits,
): Promise<FoundLayout> {
  const builtIn = builtInKeySchema.safeParse(layout)
  if (builtIn.success) {
    return { name: builtInName(builtIn.data), version: null, document: builtInLayout(builtIn.data, units) }
  }
  const record = await manager.findOneBy(Layout, { id: layout, groupId })
  if (!record) throw notFound('layout', 'layout')
  const stored = await findVersion(manager, record, version ?? record.version)
  return { name: stored.name, version: stored.version, document: documentOf(stored) }
}

/**
 * The layout that a download asks for; without one, the house's own three columns.
 *
 * @throws {HttpError} NOT_FOUND with the field
 */
export function layoutFor(
  manager: EntityManager,
  groupId: string,
  { layout = DEFAULT_BUILT_IN, layoutVersion, ...units }: TableWriting,
): Promise<FoundLayout> {
  return findLayout(manager, groupId, { layout, version: layoutVersion }, units)
}

/** @throws {HttpError} NOT_FOUND with the field */
export async function findVersion(
  manager: EntityManager,
  { id, groupId }: Layout,
  version: number,
): Promise<LayoutVersion> {
  const where = { layoutId: id, groupId, version }
  const stored = await manager.findOne(LayoutVersion, { where, relations: { savedBy: true } })
  if (!stored) throw notFound('version of this layout', 'version')
  return stored
}

/** The document of a version, in the form of today. */
export function documentOf({ document }: LayoutVersion): LayoutDocument {
  return layoutDocumentSchema.parse(document)
}

/** What a layout of the house is called. */
export function builtInName(key: BuiltInKey): string {
  return BUILT_IN_LAYOUTS.find((each) => each.key === key)?.name ?? key
}

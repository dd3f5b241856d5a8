import { type DataSource, type EntityManager, In } from 'typeorm'
import {
  builtInKeySchema,
  type LayoutCreate,
  type LayoutList,
  type LayoutRef,
  type LayoutSave,
  type LayoutSummary,
  layoutRefSchema,
  type LayoutVersions,
  type StoredLayout,
} from '../../shared/contracts/layout'
import type { HistoryAction, HistoryDetails } from '../../shared/contracts/history'
import { writeLayoutFile } from '../../shared/documents'
import { BUILT_IN_LAYOUTS, checkLayout, DEFAULT_BUILT_IN } from '../../shared/layouts'
import { Group } from '../entities/group.entity'
import { LayoutVersion } from '../entities/layout-version.entity'
import { Layout } from '../entities/layout.entity'
import { HttpError, notFound } from '../errors/http-error'
import { builtInName, documentOf, findVersion } from './find-layout'
import type { Download, Member } from './member'
import { personOf } from './people'
import { recordEvent } from './record-event'
import { fileNamePart } from './table-names'

/** Layouts of a group. Each save makes a version; versions are never changed, layouts never deleted. */
export class LayoutService {
  constructor(private readonly dataSource: DataSource) {}

  /** Those of the house, those of the group by name, and which one is taken where nobody chooses. */
  async list({ groupId }: Member): Promise<LayoutList> {
    const { manager } = this.dataSource
    const layouts = await manager.find(Layout, { where: { groupId }, order: { name: 'ASC' } })
    const versions = await manager.find(LayoutVersion, {
      where: { layoutId: In(layouts.map(({ id }) => id)) },
      relations: { savedBy: true },
      select: { layoutId: true, version: true, name: true, savedAt: true, savedBy: { id: true, name: true } },
    })
    const newest = (layout: Layout) =>
      versions.find(({ layoutId, version }) => layoutId === layout.id && version === layout.version)
    return {
      builtIns: BUILT_IN_LAYOUTS.map((each) => ({ ...each })),
      layouts: layouts.flatMap((layout) => {
        const version = newest(layout)
        return version ? [summaryOf(layout, version)] : []
      }),
      default: await defaultOf(manager, groupId),
    }
  }

  /** A layout in its newest version, or in the one given. @throws {HttpError} NOT_FOUND */
  async get({ groupId }: Member, layoutId: string, version?: number): Promise<StoredLayout> {
    const { manager } = this.dataSource
    return readLayout(manager, await findLayoutRecord(manager, groupId, layoutId), version)
  }

  /** Every version, the newest first. @throws {HttpError} NOT_FOUND */
  async versions({ groupId }: Member, layoutId: string): Promise<LayoutVersions> {
    const { manager } = this.dataSource
    await findLayoutRecord(manager, groupId, layoutId)
    const versions = await manager.find(LayoutVersion, {
      where: { layoutId, groupId },
      relations: { savedBy: true },
      order: { version: 'DESC' },
    })
    return {
      versions: versions.map(({ version, name, savedAt, savedBy }) => ({
        version,
        name,
        savedAt: savedAt.toISOString(),
        savedBy: personOf(savedBy),
      })),
    }
  }

  /**
   * @throws {InvalidInputError} as `checkLayout`
   * @throws {HttpError} NAME_TAKEN (by the database's constraint)
   */
  async create(member: Member, { name, document }: LayoutCreate): Promise<StoredLayout> {
    checkLayout(document)
    return this.dataSource.transaction(async (manager) => {
      const { groupId } = member
      const layout = await manager.save(Layout, { groupId, name, version: 1, archivedAt: null })
      await addVersion(manager, member, layout, { name, document })
      await record(manager, member, layout, 'layout added')
      return readLayout(manager, layout)
    })
  }

  /**
   * Saves a layout as its next version.
   *
   * @throws {InvalidInputError} as `checkLayout`
   * @throws {HttpError} NOT_FOUND; CONFLICT with the newest version when someone saved in between; NAME_TAKEN
   */
  async save(
    member: Member,
    layoutId: string,
    { version, name, document }: LayoutSave,
  ): Promise<StoredLayout> {
    checkLayout(document)
    return this.dataSource.transaction(async (manager) => {
      const layout = await lockLayout(manager, member.groupId, layoutId)
      if (layout.version !== version) {
        const details = await readLayout(manager, layout)
        const who = details.savedBy?.name ?? 'Someone'
        throw new HttpError(
          'CONFLICT',
          `${who} saved version ${layout.version} of this layout in between. Nothing of yours is lost: compare the two and save again.`,
          { details },
        )
      }
      const details: HistoryDetails = { version: version + 1 }
      if (layout.name !== name) details['before'] = layout.name
      await manager.save(Layout, Object.assign(layout, { name, version: version + 1 }))
      await addVersion(manager, member, layout, { name, document })
      await record(manager, member, layout, 'layout changed', details)
      return readLayout(manager, layout)
    })
  }

  /** A new layout with the newest document of another. @throws {HttpError} NOT_FOUND; NAME_TAKEN */
  async copy(member: Member, layoutId: string, name: string): Promise<StoredLayout> {
    const { document } = await this.get(member, layoutId)
    return this.create(member, { name, document })
  }

  /** Takes a layout out of the offer, or back into it. The group's default ends with it. @throws {HttpError} NOT_FOUND */
  async setArchived(member: Member, layoutId: string, archived: boolean): Promise<StoredLayout> {
    return this.dataSource.transaction(async (manager) => {
      const { groupId } = member
      const layout = await lockLayout(manager, groupId, layoutId)
      if ((layout.archivedAt !== null) !== archived) {
        await manager.save(Layout, Object.assign(layout, { archivedAt: archived ? new Date() : null }))
        if (archived)
          await manager.update(Group, { id: groupId, defaultLayout: layoutId }, { defaultLayout: null })
        await record(manager, member, layout, archived ? 'layout archived' : 'layout restored')
      }
      return readLayout(manager, layout)
    })
  }

  /** Says what the group takes where nobody chooses. @throws {HttpError} NOT_FOUND for one that is not there or archived */
  async setDefault(member: Member, layout: LayoutRef): Promise<LayoutList> {
    await this.dataSource.transaction(async (manager) => {
      const { groupId } = member
      const builtIn = builtInKeySchema.safeParse(layout)
      const chosen = builtIn.success ? null : await lockLayout(manager, groupId, layout)
      if (chosen?.archivedAt) throw notFound('layout on offer', 'layout')
      await manager.update(Group, { id: groupId }, { defaultLayout: layout })
      await recordEvent(manager, member, {
        action: 'default layout changed',
        subject: {
          kind: 'layout',
          id: chosen?.id ?? null,
          name: chosen?.name ?? (builtIn.success ? builtInName(builtIn.data) : layout),
        },
      })
    })
    return this.list(member)
  }

  /** A layout as a file that another group can bring in. @throws {HttpError} NOT_FOUND */
  async file(member: Member, layoutId: string, version?: number): Promise<Download> {
    const layout = await this.get(member, layoutId, version)
    const text = writeLayoutFile(layout.document, layout.name)
    return { fileName: `${fileNamePart(layout.name)}.layout.json`, bytes: Buffer.from(text) }
  }
}

/** What the group takes where nobody chooses. */
export async function defaultOf(manager: EntityManager, groupId: string): Promise<LayoutRef> {
  const { defaultLayout } = await manager.findOneByOrFail(Group, { id: groupId })
  return defaultLayout === null ? DEFAULT_BUILT_IN : layoutRefSchema.parse(defaultLayout)
}

async function findLayoutRecord(manager: EntityManager, groupId: string, id: string): Promise<Layout> {
  const layout = await manager.findOneBy(Layout, { id, groupId })
  if (!layout) throw notFound('layout')
  return layout
}

async function lockLayout(manager: EntityManager, groupId: string, id: string): Promise<Layout> {
  const layout = await manager.findOne(Layout, {
    where: { id, groupId },
    lock: { mode: 'pessimistic_write' },
  })
  if (!layout) throw notFound('layout', 'layout')
  return layout
}

async function addVersion(
  manager: EntityManager,
  { userId }: Member,
  { id, groupId, version }: Layout,
  { name, document }: LayoutCreate,
): Promise<void> {
  const row = { groupId, layoutId: id, version, name, document, savedAt: new Date(), savedById: userId }
  await manager.save(LayoutVersion, row)
}

async function readLayout(manager: EntityManager, layout: Layout, version?: number): Promise<StoredLayout> {
  const stored = await findVersion(manager, layout, version ?? layout.version)
  return {
    ...summaryOf(layout, stored),
    document: documentOf(stored),
    newestVersion: layout.version,
  }
}

function summaryOf(
  { id, archivedAt }: Layout,
  { version, name, savedAt, savedBy }: LayoutVersion,
): LayoutSummary {
  return {
    id,
    name,
    version,
    archived: archivedAt !== null,
    savedAt: savedAt.toISOString(),
    savedBy: personOf(savedBy),
  }
}

function record(
  manager: EntityManager,
  member: Member,
  { id, name }: Layout,
  action: HistoryAction,
  details: HistoryDetails = {},
): Promise<void> {
  return recordEvent(manager, member, { action, subject: { kind: 'layout', id, name }, details })
}

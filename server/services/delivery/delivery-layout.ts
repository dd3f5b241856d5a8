import type { EntityManager } from 'typeorm'
import {
  MAX_OWN_ROW_TEMPLATE,
  MAX_OWN_ROWS,
  type OwnLayout,
  type WritingQuery,
} from '../../../shared/contracts/delivery-writing'
import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import { builtInKeySchema } from '../../../shared/contracts/layout'
import { InvalidInputError } from '../../../shared/errors'
import { pointsBeforeRunning } from '../../../shared/hand-over'
import { checkLayout, DEFAULT_BUILT_IN, type Layout, layoutSentences } from '../../../shared/layouts'
import type { CoordinateKind } from '../../../shared/units'
import { findLayout } from '../find-layout'
import type { ReleasedHandOver } from '../hand-over/archive'
import type { ManifestTable } from '../hand-over/manifest'

/** A layout that a recipient takes the tables in. */
export interface DeliveryLayout {
  readonly name: string
  readonly document: Layout
  /** One of the house's own: its conventions are those of the release. */
  readonly house: boolean
}

/**
 * The layout that a download asks for.
 *
 * @returns null for the files as they were released
 * @throws {HttpError} NOT_FOUND with the field
 */
export async function deliveryLayout(
  manager: EntityManager,
  { groupId, frozen }: ReleasedHandOver,
  query: WritingQuery,
): Promise<DeliveryLayout | null> {
  const { layout, ...units } = query
  if (layout === undefined && Object.values(units).every((unit) => unit === undefined)) return null
  const asked = layout ?? DEFAULT_BUILT_IN
  const { length, angle, energy } = frozen.layout
  const found = await findLayout(
    manager,
    groupId,
    { layout: asked },
    { length: units.length ?? length, angle: units.angle ?? angle, energy: units.energy ?? energy },
  )
  return { ...found, house: builtInKeySchema.safeParse(asked).success }
}

/**
 * A layout that a recipient brought along.
 *
 * @throws {InvalidInputError} as `checkLayout`; LAYOUT_INVALID with the field for more rows than anyone's engine reads
 */
export function ownLayout({ name, document }: OwnLayout): DeliveryLayout {
  checkLayout(document)
  for (const kind of ['bond', 'angle', 'dihedral'] as const) {
    if ((document[kind].rows ?? 0) > MAX_OWN_ROWS) {
      throw new InvalidInputError('LAYOUT_INVALID', `Ask for ${MAX_OWN_ROWS} rows at most.`, {
        field: `${kind}.rows`,
      })
    }
  }
  for (const [field, template] of [
    ['rowTemplate', document.rowTemplate],
    ['joint.rowTemplate', document.joint.rowTemplate],
  ]) {
    if (template.length > MAX_OWN_ROW_TEMPLATE) {
      const message = `Keep the row within ${MAX_OWN_ROW_TEMPLATE} characters.`
      throw new InvalidInputError('LAYOUT_INVALID', message, { field })
    }
  }
  return { name, document, house: false }
}

/** What is frozen, with what is said of layout and conventions put in terms of another layout. */
export function frozenInLayout(
  frozen: FrozenHandOver,
  { name, document, house }: DeliveryLayout,
  tables: readonly ManifestTable[],
): FrozenHandOver {
  const { bond, angle } = document
  const units = { length: bond.coordinateUnit, angle: angle.coordinateUnit, energy: bond.energyUnit }
  const kinds = (['bond', 'angle', 'dihedral'] as const).filter((kind: CoordinateKind) =>
    tables.some((table) => table.kinds.includes(kind)),
  )
  const points = pointsBeforeRunning({
    layout: units,
    temperature: frozen.statePoint.temperature,
    tables: tables.map(({ name: table, kinds: its, meta }) => ({ name: table, kinds: its, form: meta.form })),
    // A layout of somebody's own has conventions of its own: its sentences take the place of the house's.
    readings: house && document.columns.includes('force') ? null : layoutSentences(document, kinds),
  })
  return {
    ...frozen,
    layout: { layoutId: null, ...units, name, document },
    points,
  }
}

/** What the file of a table is called in a layout: JSON ends in .json, all else in .txt. */
export function nameWritten(path: string, { document }: DeliveryLayout): string {
  return path.replace(/\.(txt|json)$/, document.writing === 'json' ? '.json' : '.txt')
}

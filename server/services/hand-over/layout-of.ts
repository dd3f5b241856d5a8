import type { EntityManager } from 'typeorm'
import type { FrozenHandOver, HandOverLayout } from '../../../shared/contracts/hand-over'
import { DEFAULT_BUILT_IN } from '../../../shared/layouts'
import type { HandOver } from '../../entities/hand-over.entity'
import { HttpError } from '../../errors/http-error'
import { findLayout, type FoundLayout } from '../find-layout'

/** The layout of a hand-over by value. @throws {HttpError} NOT_FOUND with the field */
export function layoutOf(
  manager: EntityManager,
  { groupId, layout }: Pick<HandOver, 'groupId' | 'layout'>,
): Promise<FoundLayout> {
  const { layoutId, layoutVersion, length, angle, energy } = layout
  const asked = { layout: layoutId ?? DEFAULT_BUILT_IN, version: layoutVersion ?? undefined }
  return findLayout(manager, groupId, asked, { length, angle, energy })
}

/** Name of the layout of a hand-over, with its version; null when the group has it no more. */
export async function layoutName(
  manager: EntityManager,
  handOver: Pick<HandOver, 'groupId' | 'layout'>,
): Promise<string | null> {
  try {
    const { name, version } = await layoutOf(manager, handOver)
    return version === null ? name : `${name}, version ${version}`
  } catch (error) {
    if (error instanceof HttpError && error.code === 'NOT_FOUND') return null
    throw error
  }
}

/**
 * A choice of layout that stays what it is: one of the group is held to its version, and takes over the units of that version.
 *
 * @throws {HttpError} NOT_FOUND with the field
 */
export async function heldLayout(
  manager: EntityManager,
  handOver: Pick<HandOver, 'groupId' | 'layout'>,
): Promise<HandOverLayout> {
  const { version, document } = await layoutOf(manager, handOver)
  const { layout } = handOver
  if (version === null) return { ...layout, layoutVersion: null }
  return {
    layoutId: layout.layoutId,
    layoutVersion: version,
    length: document.bond.coordinateUnit,
    angle: document.angle.coordinateUnit,
    energy: document.bond.energyUnit,
  }
}

/** The layout of a hand-over as a release freezes it. */
export async function frozenLayout(
  manager: EntityManager,
  handOver: Pick<HandOver, 'groupId' | 'layout'>,
): Promise<FrozenHandOver['layout'] & Pick<FoundLayout, 'document'>> {
  const { name, document } = await layoutOf(manager, handOver)
  return { ...handOver.layout, name, document }
}

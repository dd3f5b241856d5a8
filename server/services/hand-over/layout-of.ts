import type { EntityManager } from 'typeorm'
import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import type { HandOver } from '../../entities/hand-over.entity'
import { notFound } from '../../errors/http-error'

/** What the house's own layout is called. */
const HOUSE_LAYOUT = 'Three columns'

/** Name of the layout of a hand-over; null when the group's layout it names is gone. */
export function layoutName(
  _manager: EntityManager,
  { layout }: Pick<HandOver, 'layout'>,
): Promise<string | null> {
  return Promise.resolve(layout.layoutId === null ? HOUSE_LAYOUT : null)
}

/** The layout of a hand-over by value, as a release freezes it. */
export async function frozenLayout(
  manager: EntityManager,
  handOver: Pick<HandOver, 'layout'>,
): Promise<FrozenHandOver['layout']> {
  const name = await layoutName(manager, handOver)
  if (name === null) throw notFound('layout', 'layout.layoutId')
  return { ...handOver.layout, name, document: null }
}

import type { KeyScope } from '../../shared/contracts/key'
import type { Resource } from '../services/access.service'
import type { AnyRoute } from './route'

/** What belongs to the work of a group, and so may be reached by a key. Whatever is not named here is closed to keys. */
const AREAS: Partial<Record<Resource, 'data' | 'hand-overs'>> = {
  polymer: 'data',
  statePoint: 'data',
  mapping: 'data',
  term: 'data',
  distribution: 'data',
  jointDistribution: 'data',
  potential: 'data',
  layout: 'data',
  handOver: 'hand-overs',
  recipient: 'hand-overs',
  question: 'hand-overs',
  returnedFile: 'hand-overs',
}

/** Decisions of people about people and work: never by a script. */
const ALWAYS_IN_PERSON: readonly string[] = ['manage', 'review']

/**
 * The scope that a key needs for a route: null when no key opens it. A route may name it; else reading asks for read, and
 * writing for the scope of what is written; a hand-over made under a polymer is a hand-over.
 */
export function keyScopeOf({
  access,
  scope,
  method,
  path,
}: Pick<AnyRoute, 'access' | 'scope' | 'method' | 'path'>): KeyScope | null {
  if (typeof access !== 'object' || ALWAYS_IN_PERSON.includes(access.may)) return null
  if (scope !== undefined) return scope
  const area = AREAS[access.at]
  if (area === undefined) return null
  if (method === 'get') return 'read'
  return area === 'hand-overs' || path.endsWith('/hand-overs') ? 'hand-overs' : 'write'
}

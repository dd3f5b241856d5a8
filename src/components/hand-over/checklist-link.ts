import type { RouteLocationRaw } from 'vue-router'
import type { HandOverDetail } from '@shared/contracts/hand-over-desk'

type Place = NonNullable<HandOverDetail['checklist'][number]['lines'][number]['place']>

/** Where a line of the checklist is mended: a room of the mapping, or a part of the hand-over itself. */
export function checklistLink(
  { room, termId, firstTermId, secondTermId }: Place,
  { polymerId, mappingId, statePointId }: Pick<HandOverDetail, 'polymerId' | 'mappingId' | 'statePointId'>,
): { readonly to: RouteLocationRaw; readonly text: string } {
  const params = { polymerId, mappingId }
  const query = { statePoint: statePointId }
  switch (room) {
    case 'bench':
      return { to: { name: 'bench', params: { ...params, termId }, query }, text: 'To the bench' }
    case 'intake':
      return { to: { name: 'intake', params, query: { ...query, term: termId } }, text: 'Bring data' }
    case 'correlation':
      return {
        to: { name: 'correlation', params: { ...params, pair: `${firstTermId}~${secondTermId}` }, query },
        text: 'Look at the pair',
      }
    case 'mapping':
      return { to: { name: 'mapping', params, query }, text: 'To the mapping' }
    case 'layout':
      return { to: { hash: '#layout' }, text: 'Choose' }
    case 'terms':
      return { to: { hash: '#terms' }, text: 'See below' }
  }
}

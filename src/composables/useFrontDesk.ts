import { computed, ref, shallowRef, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { RouteLocationRaw } from 'vue-router'
import type { ReceivedEntry } from '@shared/contracts/delivery'
import type { Waiting as WaitingHandOvers } from '@shared/contracts/hand-over-desk'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer } from '@shared/contracts/polymer'
import { listReceived } from '@/api/deliveries'
import { getWaiting } from '@/api/hand-overs'
import { ApiError } from '@/api/http'
import { listMappings } from '@/api/mappings'
import { listPolymers } from '@/api/polymers'
import { tableWords } from '@/components/delivery/delivery-words'
import { countOf, formatCount } from '@/format/numbers'
import { statePointName } from '@/format/state-point'
import { useSessionStore } from '@/stores/session'

export interface DeskPolymer {
  readonly polymer: Polymer
  readonly mappings: readonly Mapping[]
}

export interface DeskGroup {
  readonly groupId: string
  readonly groupName: string
  readonly polymers: readonly DeskPolymer[]
  readonly handOvers: Omit<WaitingHandOvers, 'gaps'>
}

/** Something that cannot go on without the person: what, about which polymer, and where to do it. */
export interface Waiting {
  readonly key: string
  readonly text: string
  readonly about: string
  readonly to: RouteLocationRaw
}

/** What a polymer still lacks before its tables can be made. */
export const waitingFor = ({ polymer, mappings }: DeskPolymer): Waiting[] => {
  const room = { name: 'polymer', params: { polymerId: polymer.id } }
  const found: Waiting[] = []
  const add = (key: string, text: string, to: RouteLocationRaw, about = polymer.name): void => {
    found.push({ key: `${polymer.id}-${key}`, text, about, to })
  }
  if (polymer.counts.statePoints === 0) {
    add('state-points', 'No state point yet', { ...room, hash: '#state-points' })
  }
  if (mappings.length === 0) add('mappings', 'No mapping yet', { ...room, hash: '#mappings' })
  for (const { id, name, counts } of mappings) {
    const params = { polymerId: polymer.id, mappingId: id }
    const about = `${polymer.name}, ${name}`
    const missing = counts.terms - counts.termsWithData
    if (counts.terms === 0) add(id, 'No terms yet: paint its beads', { name: 'mapping', params }, about)
    else if (missing > 0) {
      add(
        id,
        `${countOf(missing, 'term')} of ${counts.terms} without data`,
        { name: 'intake', params },
        about,
      )
    }
  }
  const open = polymer.counts.distributions - polymer.counts.potentials
  if (open > 0) {
    const all = countOf(polymer.counts.distributions, 'distribution')
    add('potentials', `${formatCount(open)} of ${all} not inverted`, { ...room, hash: '#mappings' })
  }
  return found
}

/** Hand-overs that wait for the person: to be reviewed, to be mended, to be released. */
export const handOversWaiting = ({
  reviews,
  sentBack,
  toRelease,
  questions,
  returned,
}: DeskGroup['handOvers']): Waiting[] => {
  const items = (handOvers: WaitingHandOvers['reviews'], text: (author: string) => string): Waiting[] =>
    handOvers.map(({ id, title, author, mapping, statePoint }) => ({
      key: `hand-over-${id}`,
      text: text(author?.name ?? 'someone who left'),
      about: `${title}: ${mapping}, ${statePointName(statePoint)}`,
      to: { name: 'hand-over', params: { handOverId: id } },
    }))
  return [
    ...items(reviews, (author) => `Review asked by ${author}`),
    ...items(sentBack, () => 'Sent back to you'),
    ...items(toRelease, () => 'Signed off, to be released'),
    ...questions.map(({ id, handOverId, number, table, text }) => ({
      key: `question-${id}`,
      text: `Question on ${table === null ? `hand-over ${number}` : tableWords(table)}`,
      about: `Hand-over ${number}: ${shortened(text)}`,
      to: { name: 'hand-over', params: { handOverId }, hash: '#questions' },
    })),
    ...returned.map(({ id, handOverId, number, table, name }) => ({
      key: `returned-${id}`,
      text: `File sent back for ${tableWords(table)}`,
      about: `Hand-over ${number}: ${name}`,
      to: { name: 'hand-over', params: { handOverId }, hash: '#returned' },
    })),
  ]
}

const shortened = (text: string): string => (text.length > 80 ? `${text.slice(0, 79)}…` : text)

/** The front desk: the polymers of the current group with their mappings, and what waits for someone who writes. */
export function useFrontDesk(): {
  groups: ShallowRef<readonly DeskGroup[]>
  waiting: ComputedRef<Waiting[]>
  /** Hand-overs that were sent to the person, by whichever group. */
  received: ShallowRef<readonly ReceivedEntry[]>
  loaded: Ref<boolean>
  failure: ShallowRef<ApiError | null>
  load: () => Promise<void>
} {
  const session = useSessionStore()
  const groups = shallowRef<readonly DeskGroup[]>([])
  const received = shallowRef<readonly ReceivedEntry[]>([])
  const loaded = ref(false)
  const failure = shallowRef<ApiError | null>(null)

  const withMappings = async (polymer: Polymer): Promise<DeskPolymer> => ({
    polymer,
    mappings: polymer.counts.mappings > 0 ? await listMappings(polymer.id) : [],
  })

  const load = async (): Promise<void> => {
    failure.value = null
    const shown = session.readableGroups.filter(({ groupId }) => groupId === session.currentGroup?.groupId)
    try {
      received.value = await listReceived()
      groups.value = await Promise.all(
        shown.map(async ({ groupId, groupName }) => {
          const [polymers, handOvers] = await Promise.all([
            listPolymers(groupId).then((found) => Promise.all(found.map(withMappings))),
            getWaiting(groupId),
          ])
          return { groupId, groupName, polymers, handOvers }
        }),
      )
      loaded.value = true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      failure.value = error
    }
  }

  const waiting = computed(() => [
    ...groups.value.flatMap(({ handOvers }) => handOversWaiting(handOvers)),
    ...groups.value
      .filter(({ groupId }) => session.canWrite(groupId))
      .flatMap(({ polymers }) => polymers.flatMap(waitingFor)),
  ])

  return { groups, waiting, received, loaded, failure, load }
}

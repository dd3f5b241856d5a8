import { computed, reactive, ref, shallowRef, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { HistoryAction, HistoryEvent, HistoryFilter } from '@shared/contracts/history'
import { getHistory, historyCsvUrl } from '@/api/groups'
import { ApiError } from '@/api/http'

/** The filter as it is chosen: an empty string or null stands for "any". */
export interface HistoryChoice {
  person: string | null
  action: HistoryAction | null
  subject: string
  /** Days as in 2026-06-12, both included, in the time of this browser. */
  from: string
  to: string
}

/** The first moment of a day in the time of this browser; undefined for what is no day. */
const startOf = (day: string, daysLater = 0): string | undefined => {
  const [, year, month, date] = /^(\d{4})-(\d{2})-(\d{2})$/.exec(day) ?? []
  if (year === undefined) return undefined
  const moment = new Date(Number(year), Number(month) - 1, Number(date) + daysLater)
  return Number.isNaN(moment.getTime()) ? undefined : moment.toISOString()
}

/** What the API is asked for a choice. */
export const historyFilterOf = ({ person, action, subject, from, to }: HistoryChoice): HistoryFilter => ({
  ...(person === null ? {} : { person }),
  ...(action === null ? {} : { action }),
  ...(subject.trim() === '' ? {} : { subject: subject.trim() }),
  ...(startOf(from) === undefined ? {} : { from: startOf(from) }),
  ...(startOf(to, 1) === undefined ? {} : { to: startOf(to, 1) }),
})

/** The history of a group: a filter, the events that fit it page by page, and where they are to be had as a file. */
export function useGroupHistory(groupId: Ref<string>): {
  choice: HistoryChoice
  events: ShallowRef<readonly HistoryEvent[]>
  more: Ref<boolean>
  loaded: Ref<boolean>
  failure: Ref<string>
  csvUrl: ComputedRef<string>
  load: () => Promise<void>
  loadMore: () => Promise<void>
} {
  const choice = reactive<HistoryChoice>({ person: null, action: null, subject: '', from: '', to: '' })
  const events = shallowRef<readonly HistoryEvent[]>([])
  const more = ref(false)
  const loaded = ref(false)
  const failure = ref('')
  const filter = computed(() => historyFilterOf(choice))
  const csvUrl = computed(() => historyCsvUrl(groupId.value, filter.value))

  let asked = 0
  const fetchPage = async (before: string | null): Promise<void> => {
    const mine = ++asked
    failure.value = ''
    try {
      const page = await getHistory(groupId.value, filter.value, before)
      // The filter has changed while the answer was under way.
      if (mine !== asked) return
      events.value = before === null ? page.events : [...events.value, ...page.events]
      more.value = page.more
      loaded.value = true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      if (mine === asked) failure.value = error.message
    }
  }
  const load = (): Promise<void> => fetchPage(null)
  const loadMore = (): Promise<void> => fetchPage(events.value.at(-1)?.id ?? null)

  return { choice, events, more, loaded, failure, csvUrl, load, loadMore }
}

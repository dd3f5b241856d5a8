import type { DataSource, SelectQueryBuilder } from 'typeorm'
import {
  HISTORY_EXPORT,
  HISTORY_PAGE,
  type HistoryEvent,
  type HistoryFilter,
  type HistoryPage,
  type HistoryQuery,
} from '../../shared/contracts/history'
import { csvText } from '../../shared/csv'
import { Event } from '../entities/event.entity'
import type { Download, Member } from './member'
import { personOf } from './people'

/** Who did what in a group. Everyone who sees the group's work sees it: nobody acts unseen by those who build on it. */
export class HistoryService {
  constructor(private readonly dataSource: DataSource) {}

  /** A page of events, the newest first. */
  async list({ groupId }: Member, { before, ...filter }: HistoryQuery): Promise<HistoryPage> {
    const query = this.query(groupId, filter).limit(HISTORY_PAGE + 1)
    if (before !== undefined) query.andWhere('event.id < :before', { before })
    const events = await query.getMany()
    return { events: events.slice(0, HISTORY_PAGE).map(eventBody), more: events.length > HISTORY_PAGE }
  }

  /** The events as comma-separated values, the newest first. Nothing in it runs as a formula. */
  async csv({ groupId }: Member, filter: HistoryFilter): Promise<Download> {
    const found = await this.query(groupId, filter).limit(HISTORY_EXPORT).getMany()
    const events = found.map(eventBody)
    const column = (header: string, value: (event: HistoryEvent) => string | null) => {
      return { header, values: events.map(value) }
    }
    const text = csvText(
      [],
      [
        column('time (UTC)', ({ at }) => at),
        column('person', ({ person, by }) => person?.name ?? by),
        column('by', ({ person, by }) => (person ? by : null)),
        column('action', ({ action }) => action),
        column('kind', ({ subject }) => subject.kind),
        column('subject', ({ subject }) => subject.name),
        column('details', ({ details }) => detailsText(details)),
      ],
    )
    return { fileName: 'history.csv', bytes: new TextEncoder().encode(text) }
  }

  private query(groupId: string, filter: HistoryFilter): SelectQueryBuilder<Event> {
    const { person, action, subject, from, to } = filter
    const query = this.dataSource.manager
      .createQueryBuilder(Event, 'event')
      .leftJoinAndSelect('event.user', 'user')
      .where('event.groupId = :groupId', { groupId })
      .orderBy('event.id', 'DESC')
    if (person !== undefined) query.andWhere('event.userId = :person', { person })
    if (action !== undefined) query.andWhere('event.action = :action', { action })
    // strpos, since % and _ in a name are no patterns.
    if (subject) query.andWhere('strpos(lower(event.subjectName), lower(:subject)) > 0', { subject })
    if (from !== undefined) query.andWhere('event.at >= :from', { from })
    if (to !== undefined) query.andWhere('event.at < :to', { to })
    return query
  }
}

function detailsText(details: HistoryEvent['details']): string {
  return Object.entries(details)
    .map(([name, value]) => `${name}: ${String(value)}`)
    .join(', ')
}

function eventBody({
  id,
  at,
  action,
  user,
  by,
  subjectKind,
  subjectId,
  subjectName,
  details,
}: Event): HistoryEvent {
  const subject = { kind: subjectKind, id: subjectId, name: subjectName }
  return { id, at: at.toISOString(), action, person: personOf(user), by, subject, details }
}

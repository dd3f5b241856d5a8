import type { VerdictNumbers, Decision } from '../contracts/distribution'

/** Where a point of the checklist can be mended. */
export type ChecklistPlace =
  | { readonly room: 'bench' | 'intake'; readonly termId: string }
  | { readonly room: 'correlation'; readonly firstTermId: string; readonly secondTermId: string }
  | { readonly room: 'mapping' | 'layout' | 'terms' }

/** A warning, and whether somebody said why it is kept. */
export interface ChecklistWarning {
  readonly code: string
  readonly answered: boolean
}

/** A term of the mapping, as far as the checklist looks at it. */
export interface ChecklistTerm {
  readonly id: string
  readonly name: string
  /** `refused`: the core makes no table of it, with the sentence in `reason`. */
  readonly state: 'covered' | 'no data' | 'not inverted' | 'stale' | 'refused' | 'left out'
  /** Why it is left out or refused; empty otherwise. */
  readonly reason: string
  readonly warnings: readonly ChecklistWarning[]
}

/** Two terms with joint data, both handed over. */
export interface ChecklistPair {
  readonly firstTermId: string
  readonly secondTermId: string
  readonly name: string
  readonly verdict: VerdictNumbers['verdict']
  readonly decision: Decision['choice'] | null
  /** A joint table takes the place of both single ones. */
  readonly together: boolean
  /** Why the core makes no joint table; null where it does, or where none is asked for. */
  readonly refused: string | null
  readonly warnings: readonly ChecklistWarning[]
}

/** What the checklist rests on. */
export interface ChecklistFacts {
  readonly terms: readonly ChecklistTerm[]
  readonly pairs: readonly ChecklistPair[]
  /** Pairs of terms that share a bead, but whose joint distribution nobody brought in. */
  readonly unexamined: number
  /** The layout and units in words; null when the layout chosen is gone. */
  readonly layout: string | null
}

export type ChecklistCode =
  'TERMS_COVERED' | 'VERDICTS_RECORDED' | 'WARNINGS_ANSWERED' | 'DATA_FIT_MAPPING' | 'LAYOUT_STATED'

/** A line under a point: what is open, with the place to mend it, or what stays on record. */
export interface ChecklistLine {
  readonly text: string
  readonly open: boolean
  readonly place: ChecklistPlace | null
}

/** One point that must be met before review is asked for and before a release. */
export interface ChecklistItem {
  readonly code: ChecklistCode
  readonly title: string
  readonly met: boolean
  readonly lines: readonly ChecklistLine[]
}

/** The warning that data came in on an earlier revision of the mapping: a point of its own. */
export const MAPPING_CHANGED = 'MAPPING_CHANGED'

const WANTING: Readonly<Record<Exclude<ChecklistTerm['state'], 'covered' | 'left out'>, string>> = {
  'no data': 'no data at this state point',
  'not inverted': 'data, but no saved potential',
  stale: 'its data changed after the potential was saved',
  refused: 'no table can be made',
}

/**
 * What must hold before a hand-over goes to review or out: every term in use has a table or a reason, every pair that needs a
 * verdict has one on record, every warning is answered, the data belong to the mapping as it is, and the layout is there.
 *
 * A pair needs a decision where joint data are there and the verdict is anything but separable. Pairs without joint data are
 * counted, but hold nothing up: nobody can measure all of them.
 *
 * @returns five points in this order, each with what is open first
 */
export function handOverChecklist(facts: ChecklistFacts): ChecklistItem[] {
  const joined = new Set(
    facts.pairs.filter(({ together }) => together).flatMap((pair) => [pair.firstTermId, pair.secondTermId]),
  )
  return [
    item('TERMS_COVERED', 'Every term in use has a table', coverage(facts, joined)),
    item('VERDICTS_RECORDED', 'Verdicts are recorded for every pair that needs one', verdicts(facts)),
    item('WARNINGS_ANSWERED', 'Every warning is answered or kept with a reason', warnings(facts, joined)),
    item('DATA_FIT_MAPPING', 'The data fit the mapping as it is now', fitting(facts)),
    item('LAYOUT_STATED', 'Layout and units are stated', [
      facts.layout === null
        ? open('The layout chosen for this hand-over is gone: choose another.', { room: 'layout' })
        : record(facts.layout),
    ]),
  ]
}

function item(code: ChecklistCode, title: string, lines: readonly ChecklistLine[]): ChecklistItem {
  const sorted = [...lines.filter((line) => line.open), ...lines.filter((line) => !line.open)]
  return { code, title, met: lines.every((line) => !line.open), lines: sorted }
}

const open = (text: string, place: ChecklistPlace | null): ChecklistLine => ({ text, open: true, place })
const record = (text: string): ChecklistLine => ({ text, open: false, place: null })

function coverage({ terms }: ChecklistFacts, joined: ReadonlySet<string>): ChecklistLine[] {
  const used = terms.filter(({ state }) => state !== 'left out')
  if (used.length === 0) return [open('No term is handed over.', { room: 'terms' })]
  return terms.flatMap(({ id, name, state, reason }): ChecklistLine[] => {
    if (state === 'left out') return [record(`${name} is left out on record: ${reason}`)]
    // A joint table needs no single one beside it.
    if (state === 'covered' || joined.has(id)) return []
    const room = state === 'no data' ? 'intake' : 'bench'
    return [open(`${name}: ${state === 'refused' ? reason : WANTING[state]}`, { room, termId: id })]
  })
}

function verdicts({ pairs, unexamined }: ChecklistFacts): ChecklistLine[] {
  const lines = pairs.flatMap((pair): ChecklistLine[] => {
    const { name, verdict, decision, together, refused } = pair
    const at = placeOf(pair)
    if (decision === null) {
      return verdict === 'separable' ? [] : [open(`${name}: ${VERDICTS[verdict]}, and no decision`, at)]
    }
    if (decision === 'change mapping') return [open(`${name}: it was decided to change the mapping`, at)]
    if (together && refused !== null) return [open(`${name}: ${refused}`, at)]
    return together ? [record(`${name} are handed over as one joint table`)] : []
  })
  const doubly = twiceJoined(pairs).map((pair) =>
    open(`${pair.name}: one of the two is in another joint table already; keep one of the pairs apart`, {
      room: 'terms',
    }),
  )
  const rest =
    unexamined === 0
      ? []
      : [record(`${unexamined} pair${unexamined === 1 ? '' : 's'} that share a bead without joint data`)]
  return [...lines, ...doubly, ...rest]
}

const VERDICTS: Readonly<Record<VerdictNumbers['verdict'], string>> = {
  separable: 'separable',
  borderline: 'borderline',
  joint: 'a joint potential is advised',
  undecided: 'too few samples to say',
}

/** Joint tables that share a term with an earlier one: the two would count its energy twice. */
function twiceJoined(pairs: readonly ChecklistPair[]): ChecklistPair[] {
  const seen = new Set<string>()
  return pairs.filter(({ together, firstTermId, secondTermId }) => {
    if (!together) return false
    const again = seen.has(firstTermId) || seen.has(secondTermId)
    seen.add(firstTermId).add(secondTermId)
    return again
  })
}

/** Warnings of the tables that go out: of a pair the joint table's, not those of the single ones it replaces. */
function warnings({ terms, pairs }: ChecklistFacts, joined: ReadonlySet<string>): ChecklistLine[] {
  const single = terms
    .filter(({ id, state }) => state === 'covered' && !joined.has(id))
    .flatMap((term) => unanswered(term.name, term.warnings, { room: 'bench', termId: term.id }))
  const joint = pairs
    .filter(({ together }) => together)
    .flatMap((pair) => unanswered(pair.name, pair.warnings, { room: 'terms' }))
  return [...single, ...joint]
}

function unanswered(name: string, all: readonly ChecklistWarning[], place: ChecklistPlace): ChecklistLine[] {
  return all
    .filter(({ code, answered }) => code !== MAPPING_CHANGED && !answered)
    .map(({ code }) => open(`${name}: ${code}`, place))
}

function fitting({ terms, pairs }: ChecklistFacts): ChecklistLine[] {
  const changed = (all: readonly ChecklistWarning[]): boolean =>
    all.some(({ code, answered }) => code === MAPPING_CHANGED && !answered)
  return [
    ...terms
      .filter(({ state, warnings: all }) => state !== 'left out' && changed(all))
      .map(({ name }) => open(`${name}: ${OLDER_DATA}`, { room: 'terms' })),
    ...pairs
      .filter(({ together, warnings: all }) => together && changed(all))
      .map((pair) => open(`${pair.name}: ${OLDER_DATA}`, { room: 'terms' })),
  ]
}

const OLDER_DATA = 'its data came in on an earlier revision of the mapping'

function placeOf({ firstTermId, secondTermId }: ChecklistPair): ChecklistPlace {
  return { room: 'correlation', firstTermId, secondTermId }
}

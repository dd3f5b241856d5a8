import type { HandOverStanding } from '@shared/contracts/hand-over'
import type { HandOver, HandOverDetail, HandOverTerm } from '@shared/contracts/hand-over-desk'
import type { WarningCode } from '@shared/inversion'
import { placesWords } from '@shared/hand-over/coordinate-words'
import type { CoordinateKind } from '@shared/units'
import { WARNING_TITLES } from '@/components/bench/warning-titles'
import { formatDay } from '@/format/dates'

/** What a warning is called; those that only hand-overs know beside those of the bench. */
export function warningTitle(code: string): string {
  if (code === 'MAPPING_CHANGED') return 'Data that no longer fit the mapping'
  if (code === 'JOINT_SPARSE') return 'Few samples for two coordinates at once'
  return code in WARNING_TITLES ? WARNING_TITLES[code as WarningCode] : code
}

/** A line of the checklist: the code of a warning at its end becomes its title. */
export function lineWords(text: string): string {
  return text.replace(/: ([A-Z][A-Z0-9_]+)$/, (_, code: string) => `: ${lowered(warningTitle(code))}`)
}

/** What a hand-over is called: its number once it has one. */
export function handOverTitle({ number, title }: Pick<HandOver, 'number' | 'title'>): string {
  return number === null ? title : `Hand-over ${number}`
}

/** Where a hand-over stands, with whose turn it is or since when. */
export function standingSentence(handOver: HandOver): string {
  const { standing, reviewer, releasedAt, signedOffBy, withdrawn, replacedBy } = handOver
  const by = (name: string | undefined): string => (name === undefined ? '' : ` by ${name}`)
  const sentences: Record<HandOverStanding, string> = {
    draft: 'draft',
    'in review': `in review${reviewer ? `, with ${reviewer.name}` : ''}`,
    'sent back': 'sent back',
    'signed off': `signed off${by(signedOffBy?.name)}`,
    released: `released ${releasedAt === null ? '' : formatDay(releasedAt)}${replacedBy ? `, replaced by hand-over ${replacedBy.number}` : ''}`,
    withdrawn: `withdrawn ${withdrawn === null ? '' : formatDay(withdrawn.at)}`,
  }
  return sentences[standing]
}

/** How the data, the curve and its uncertainty of a term stand, in a line. */
export function evidenceSentence({ evidence, source }: Pick<HandOverTerm, 'evidence' | 'source'>): string {
  if (evidence === null) return ''
  const { independentSamples, basins, form } = evidence
  const parts = [
    independentSamples === null
      ? 'number of samples not stated'
      : `${Math.round(independentSamples).toLocaleString('en').replace(/,/g, '\u00a0')} independent samples`,
    basins === null ? '' : `${basins} ${basins === 1 ? 'basin' : 'basins'}`,
    form === null
      ? 'smooth curve'
      : `form ${form.name}${form.deviation === null ? '' : `, off the smooth curve by ${form.deviation.toFixed(2)} kT at most`}`,
    source === null ? '' : `from ${source}`,
  ]
  return parts.filter((part) => part !== '').join('; ')
}

/** The range of a table, as in 0.12 to 0.48 nm; of a joint one both. */
export function domainWords(
  kinds: readonly CoordinateKind[],
  domain: readonly (readonly number[])[],
): string {
  return domain
    .map(([low, high], axis) => {
      const [from, to] = [low, high].map((end) => placesWords([kinds[axis]], [end]))
      return kinds[axis] === 'bond' ? `${from.replace(/ nm$/, '')} to ${to}` : `${from} to ${to}`
    })
    .join(', ')
}

/** Comments about a term; null for those about the whole. */
export function commentsOf({ comments }: HandOverDetail, termId: string | null): HandOverDetail['comments'] {
  return comments.filter((comment) => comment.termId === termId)
}

function lowered(title: string): string {
  return title.charAt(0).toLowerCase() + title.slice(1)
}

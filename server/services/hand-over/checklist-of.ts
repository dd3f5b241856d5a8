import {
  type ChecklistItem,
  type ChecklistTerm,
  type ChecklistWarning,
  handOverChecklist,
} from '../../../shared/hand-over'
import { unitSymbol } from '../../../shared/units'
import type { HandOver } from '../../entities/hand-over.entity'
import { termPairs } from '../term-pairs'
import type { ContentTerm, HandOverContent } from './content'
import {
  type AnsweredWarning,
  evidenceOfPair,
  evidenceOfTerm,
  warningsOfPair,
  warningsOfTerm,
} from './table-evidence'

/** The checklist of a hand-over as its content is now. */
export function checklistOf(
  { layout }: HandOver,
  content: HandOverContent,
  layoutName: string | null,
): ChecklistItem[] {
  const terms = content.terms.map((term): ChecklistTerm => {
    const evidence = term.leftOut ? null : evidenceOfTerm(term, content)
    return {
      id: term.term.id,
      name: term.name,
      state: stateOf(term, evidence?.refused ?? null),
      reason: term.leftOut?.reason ?? evidence?.refused ?? '',
      warnings: term.leftOut ? [] : warningsOfTerm(term, content).map(checked),
    }
  })
  const pairs = content.pairs.map((pair) => ({
    firstTermId: pair.joint.firstTermId,
    secondTermId: pair.joint.secondTermId,
    name: pair.terms.map(({ name }) => name).join(' with '),
    verdict: pair.joint.numbers.verdict,
    decision: pair.decision?.choice ?? null,
    together: pair.together,
    refused: pair.together ? evidenceOfPair(pair, content).refused : null,
    warnings: pair.together ? warningsOfPair(pair, content).map(checked) : [],
  }))
  const used = content.terms.filter(({ leftOut }) => leftOut === null).map(({ term }) => term)
  const units = [layout.length, layout.angle, layout.energy].map(unitSymbol).join(', ')
  return handOverChecklist({
    terms,
    pairs,
    unexamined: Math.max(0, termPairs(used).length - pairs.length),
    layout: layoutName === null ? null : `${layoutName}; ${units}`,
  })
}

/** How far the table of a term is. */
export function stateOf(
  { leftOut, input, potential, stale }: ContentTerm,
  refused: string | null,
): ChecklistTerm['state'] {
  if (leftOut) return 'left out'
  if (!input) return 'no data'
  if (!potential) return 'not inverted'
  if (stale) return 'stale'
  return refused === null ? 'covered' : 'refused'
}

function checked({ code, answer }: AnsweredWarning): ChecklistWarning {
  return { code, answered: answer !== null }
}

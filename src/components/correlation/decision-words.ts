import type { DecisionWrite } from '@shared/contracts/distribution'

export type DecisionChoice = DecisionWrite['choice']

/** What can be decided about a pair, in the order in which it is offered. */
export const DECISIONS: readonly { readonly choice: DecisionChoice; readonly title: string }[] = [
  { choice: 'joint', title: 'One joint potential for both terms' },
  { choice: 'separate', title: 'Two tables, one by one' },
  { choice: 'change mapping', title: 'Change the mapping' },
]

export const decisionTitle = (choice: DecisionChoice): string =>
  DECISIONS.find((decision) => decision.choice === choice)!.title

import type { HistoryDetails } from '@shared/contracts/history'

/** Names of details that are no words of the trade. */
const NAMES: Readonly<Record<string, string>> = {
  separableBelow: 'separable below',
  jointAbove: 'joint potential from',
  flatBelow: 'dihedral flat below',
}

/** The facts of an event in a line: "jointAbove" from 0.1 to 0.2 reads "joint potential from: 0.1 → 0.2". */
export const detailWords = (details: HistoryDetails): string => {
  const { what, old, new: now, ...rest } = details
  const words: string[] = []
  const change = [old, now].filter((value) => value !== undefined && value !== null).join(' → ')
  const name = typeof what === 'string' ? (NAMES[what] ?? what) : ''
  if (change !== '' || name !== '') words.push([name, change].filter((part) => part !== '').join(': '))
  for (const [key, value] of Object.entries(rest)) words.push(`${NAMES[key] ?? key}: ${String(value)}`)
  return words.join(', ')
}

const WORDS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten']

/** A count as a sentence says it: words up to ten, figures beyond. */
export function numberWord(count: number): string {
  return WORDS[count] ?? String(count)
}

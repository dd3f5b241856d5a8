/**
 * Words as a sentence lists them.
 *
 * @example listWords(['A', 'B', 'C']) // 'A, B and C'
 */
export function listWords(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words[words.length - 1]}`
}

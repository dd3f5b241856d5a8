const TAB = 9
const CARRIAGE_RETURN = 13
const BLANK = 32

/** Blank, tab, carriage return and the like; within a line none of them ends it. */
export function isBlank(code: number): boolean {
  return code === BLANK || (code >= TAB && code <= CARRIAGE_RETURN)
}

/** Where the text between `start` and `end` begins and ends without the blanks around it. */
export function trimmed(text: string, start: number, end: number): [number, number] {
  while (start < end && isBlank(text.charCodeAt(start))) start++
  while (end > start && isBlank(text.charCodeAt(end - 1))) end--
  return [start, end]
}

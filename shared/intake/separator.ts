/** What stands between the fields of a line; 'blank' means any run of blanks and tabs. */
export type Separator = ',' | ';' | 'blank'

const COMMENT_SIGNS = '#@;!%'

/** A sign that starts a comment within a line, when a blank stands before it. */
const INLINE_COMMENT = /(?:^|[ \t])[#!%]/

/** Whether a line, given without leading blanks, is a comment. */
export function isComment(line: string): boolean {
  return line.length > 0 && COMMENT_SIGNS.includes(line[0])
}

/** The line up to a comment within it. */
export function withoutInlineComment(line: string): string {
  const comment = INLINE_COMMENT.exec(line)
  return comment ? line.slice(0, comment.index) : line
}

/**
 * What separates the fields of a data line. A comma counts as a separator unless blanks, tabs or semicolons stand where
 * a separator would: then it is a decimal comma, and it is left in its field for the reader to refuse.
 *
 * @example detectSeparator('0.1, 0.2') // ','
 * @example detectSeparator('0,1 0,2') // 'blank'
 */
export function detectSeparator(line: string): Separator {
  const content = withoutInlineComment(line).trim()
  if (content.includes(';')) return ';'
  if (!content.includes(',')) return 'blank'
  let last = ','
  let blankSeen = false
  for (const sign of content) {
    if (sign === ' ' || sign === '\t') {
      blankSeen = true
      continue
    }
    if (blankSeen && last !== ',' && sign !== ',') return 'blank'
    last = sign
    blankSeen = false
  }
  return ','
}

/** The fields of one data line, trimmed; a trailing separator adds none. */
export function splitFields(line: string, separator: Separator): string[] {
  const content = withoutInlineComment(line).trim()
  if (content === '') return []
  if (separator === 'blank') return content.split(/[ \t]+/)
  return splitAt(content, separator)
}

/** The names in a header or in the comment above the data: as fields, but between tabs a name may hold blanks. */
export function splitNames(line: string, separator: Separator): string[] {
  const content = line.trim()
  if (separator === 'blank' && content.includes('\t'))
    return splitAt(content, '\t').filter((name) => name !== '')
  if (separator !== 'blank' && content.includes(separator)) return splitAt(content, separator)
  return content === '' ? [] : content.split(/[ \t]+/)
}

function splitAt(content: string, separator: string): string[] {
  const fields = content.split(separator).map((field) => field.trim())
  if (fields.at(-1) === '') fields.pop()
  return fields
}

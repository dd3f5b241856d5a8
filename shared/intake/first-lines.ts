import type { PreviewLine } from './intake-preview'
import { detectSeparator, isComment, splitFields } from './separator'
import type { Separator } from './separator'

/** Lines a preview shows. */
const SHOWN_LINES = 12

/** Signs of a line a preview shows; what follows is cut off. */
const SHOWN_SIGNS = 200

/** A place in the text by which twelve lines have ended, in any file that has lines. */
const LOOKED_AT = 100_000

/** The first lines of a text as they stand there, with their part and, for data, their fields. */
export function firstLines(text: string): PreviewLine[] {
  const head = text.slice(0, LOOKED_AT).replace(/^\uFEFF/, '')
  const lines = head.split(head.includes('\n') ? '\n' : '\r', SHOWN_LINES)
  let separator: Separator | null = null
  return lines.map((raw, index) => {
    const shown = raw.trimEnd().slice(0, SHOWN_SIGNS)
    const content = shown.trimStart()
    const line = { line: index + 1, text: shown, fields: [] }
    if (content === '') return { ...line, role: 'blank' }
    if (isComment(content)) return { ...line, role: 'comment' }
    if (separator === null) {
      if (!/^[+-]?[\d.,]/.test(content)) return { ...line, role: 'header' }
      separator = detectSeparator(content)
    }
    return { ...line, role: 'data', fields: splitFields(content, separator) }
  })
}

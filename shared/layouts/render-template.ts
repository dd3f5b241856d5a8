import Mustache from 'mustache'

/** Values of a template's fields: text, switches, lists. */
export type TemplateView = Readonly<Record<string, unknown>>

/** Fills a checked template; nothing is escaped, since it makes text files and not pages. */
export function renderTemplate(template: string, view: TemplateView): string {
  return Mustache.render(template, view, {}, { escape: String })
}

/** Text in one line: a name with a line break in it must not make a row of its own. */
export function oneLine(text: string | null): string {
  return (text ?? '').replace(/[\s\p{Cc}]+/gu, ' ').trim()
}

/** A text around the rows with the line end it is to have; empty, or closed by a line end. */
export function closedText(text: string): string {
  return text === '' || text.endsWith('\n') ? text : `${text}\n`
}

/** Line ends of a layout instead of `\n`. */
export function withLineEnds(text: string, lineEnd: 'lf' | 'crlf'): string {
  const plain = text.replace(/\r\n?/g, '\n')
  return lineEnd === 'crlf' ? plain.replace(/\n/g, '\r\n') : plain
}

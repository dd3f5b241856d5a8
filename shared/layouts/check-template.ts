import Mustache from 'mustache'
import { InvalidInputError } from '../errors'
import { fieldsAt, type TemplateField, type TemplatePlace } from './template-fields'

/** What mustache makes of a template: type, name or text, start, end, and for a section what is in it. */
type Token = readonly [type: string, value: string, start: number, end: number, inner?: unknown]

interface Scope {
  readonly template: string
  /** Which template of the layout, for the error, as in 'header'. */
  readonly field: string
  readonly known: ReadonlyMap<string, TemplateField>
  /** Names the item of the innermost list has; '.' for the item itself. */
  readonly items: readonly string[]
}

/**
 * Checks a template: mustache's tags `{{name}}`, `{{#name}}…{{/name}}`, `{{^name}}…{{/name}}` and `{{! remark }}`, with the fields
 * of `TEMPLATE_FIELDS` and no others.
 *
 * @param field name of the template in the layout, for errors
 * @throws {InvalidInputError} TEMPLATE_FIELD_UNKNOWN with line and field; TEMPLATE_INVALID with the line for a tag or section left
 *   open, and for partials, other delimiters, a list as a value or a switch as a value
 */
export function checkTemplate(template: string, place: TemplatePlace, field: string): void {
  const scope = { template, field, known: fieldsAt(place), items: [] }
  checkTokens(parsed(template, field), scope)
}

function parsed(template: string, field: string): readonly Token[] {
  try {
    return Mustache.parse(template) as unknown as readonly Token[]
  } catch (error) {
    const message = error instanceof Error ? error.message : String(error)
    const offset = Number(/ at (\d+)$/.exec(message)?.[1] ?? 0)
    const line = lineAt(template, Math.min(offset, Math.max(0, template.length - 1)))
    const what = message.replace(/ at \d+$/, '')
    throw new InvalidInputError('TEMPLATE_INVALID', `Line ${line} of the ${words(field)}: ${what}.`, {
      field,
      line,
    })
  }
}

function checkTokens(tokens: readonly Token[], scope: Scope): void {
  for (const [type, name, start, , inner] of tokens) {
    if (type === 'text' || type === '!') continue
    const line = lineAt(scope.template, start)
    if (type === '>' || type === '=') {
      throw invalid(scope, line, `{{${type}…}} is not offered in a layout`)
    }
    if (type === '#' || type === '^') {
      checkTokens(inner as readonly Token[], sectionScope(scope, name, line, type))
    } else if (!scope.items.includes(name)) {
      const { type: kind } = knownField(scope, name, line)
      if (kind === 'list')
        throw invalid(scope, line, `“${name}” is a list; write {{#${name}}} … {{/${name}}}`)
      if (kind === 'switch')
        throw invalid(scope, line, `“${name}” only opens a section, as {{#${name}}} … {{/${name}}}`)
    }
  }
}

function sectionScope(scope: Scope, name: string, line: number, type: string): Scope {
  if (scope.items.includes(name)) return scope
  const field = knownField(scope, name, line)
  if (type === '^' || field.type === 'switch') return scope
  return { ...scope, items: field.items ?? ['.'] }
}

function knownField({ known, field, items }: Scope, name: string, line: number): TemplateField {
  const found = known.get(name)
  if (found) return found
  const near = nearest(name, [...known.keys(), ...items])
  throw new InvalidInputError(
    'TEMPLATE_FIELD_UNKNOWN',
    `Line ${line} of the ${words(field)}: there is no field “${name}” here.${near === null ? '' : ` Did you mean “${near}”?`}`,
    { field, line },
  )
}

function invalid({ field }: Scope, line: number, what: string): InvalidInputError {
  return new InvalidInputError('TEMPLATE_INVALID', `Line ${line} of the ${words(field)}: ${what}.`, {
    field,
    line,
  })
}

/** Line of a position, from 1. */
function lineAt(template: string, offset: number): number {
  return template.slice(0, offset).split('\n').length
}

/** As in 'text before the rows' for header, 'row of joint tables' for joint.rowTemplate: the words of the form. */
function words(field: string): string {
  const [last, ...owners] = field.split('.').reverse()
  const name = { header: 'text before the rows', footer: 'text after the rows' }[last] ?? 'row'
  return owners.includes('joint') ? `${name} of joint tables` : name
}

/** A known name that differs by capitals or by at most two letters at one place. */
function nearest(name: string, known: readonly string[]): string | null {
  const plain = name.toLowerCase()
  return (
    known.find((each) => each.toLowerCase() === plain) ??
    known.find((each) => isClose(plain, each.toLowerCase())) ??
    null
  )
}

function isClose(one: string, other: string): boolean {
  let start = 0
  while (start < Math.min(one.length, other.length) && one[start] === other[start]) start++
  let end = 0
  while (end < Math.min(one.length, other.length) - start && one.at(-1 - end) === other.at(-1 - end)) end++
  return Math.max(one.length, other.length) > 3 && Math.max(one.length, other.length) - start - end <= 2
}

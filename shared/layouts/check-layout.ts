import { InvalidInputError } from '../errors'
import { checkTemplate } from './check-template'
import type { Layout } from './layout'

/**
 * Checks what the form of a layout cannot say: columns, limits and templates.
 *
 * @param layout numbers within `LAYOUT_LIMITS`
 * @throws {InvalidInputError} LAYOUT_INVALID with the field; TEMPLATE_INVALID and TEMPLATE_FIELD_UNKNOWN with field and line
 */
export function checkLayout(layout: Layout): void {
  const byTemplate = layout.writing === 'template'
  checkColumns(layout.columns, 'columns', byTemplate)
  checkColumns(layout.joint.columns, 'joint.columns', byTemplate)
  if (byTemplate && layout.rowTemplate.trim() === '') {
    throw refuse('rowTemplate', 'Say how a row is written, as in {{coordinate}} {{energy}}.')
  }
  for (const kind of ['bond', 'angle', 'dihedral'] as const) {
    const { low, high } = layout[kind]
    if (low !== null && high !== null && low >= high) {
      throw refuse(`${kind}.high`, 'A table ends above its start.')
    }
  }
  checkTemplate(layout.header, 'text', 'header')
  checkTemplate(layout.rowTemplate, 'row', 'rowTemplate')
  checkTemplate(layout.footer, 'text', 'footer')
  checkTemplate(layout.joint.header, 'joint text', 'joint.header')
  checkTemplate(layout.joint.rowTemplate, 'joint row', 'joint.rowTemplate')
  checkTemplate(layout.joint.footer, 'joint text', 'joint.footer')
}

function checkColumns(columns: readonly string[], field: string, byTemplate: boolean): void {
  if (columns.length === 0 && !byTemplate) throw refuse(field, 'Choose at least one column.')
  if (new Set(columns).size < columns.length) throw refuse(field, 'A column stands in a table once.')
}

function refuse(field: string, message: string): InvalidInputError {
  return new InvalidInputError('LAYOUT_INVALID', message, { field })
}

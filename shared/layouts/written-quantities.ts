import Mustache from 'mustache'
import type { JointQuantity, Layout, LayoutQuantity } from './layout'

/** The quantities that a row of a layout holds: its columns, or the fields of its row template. */
export function writtenQuantities(layout: Layout): readonly LayoutQuantity[] {
  return layout.writing === 'template'
    ? (namesIn(layout.rowTemplate) as readonly LayoutQuantity[])
    : layout.columns
}

/** As `writtenQuantities`, for a row of a joint table. */
export function writtenJointQuantities({ writing, joint }: Layout): readonly JointQuantity[] {
  return writing === 'template' ? (namesIn(joint.rowTemplate) as readonly JointQuantity[]) : joint.columns
}

/** Names of all tags of a checked template, in sections as well. */
function namesIn(template: string): readonly string[] {
  return namesOf(Mustache.parse(template) as readonly Token[])
}

type Token = readonly [type: string, name: string, start: number, end: number, inner?: unknown]

function namesOf(tokens: readonly Token[]): string[] {
  return tokens.flatMap(([type, name, , , inner]) => [
    ...(type === 'text' || type === '!' ? [] : [name]),
    ...(Array.isArray(inner) ? namesOf(inner as Token[]) : []),
  ])
}

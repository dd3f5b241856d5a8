import { builtInLayout, type Layout } from '@shared/layouts'

export const PLAIN_UNITS = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const

/** Changes to a layout, as deep as needed; arrays are taken whole. */
export type LayoutChanges<Part = Layout> = {
  readonly [Key in keyof Part]?: Part[Key] extends readonly unknown[]
    ? Part[Key]
    : Part[Key] extends object
      ? LayoutChanges<Part[Key]>
      : Part[Key]
}

/** The three columns of the house with changes. */
export function layoutWith(changes: LayoutChanges = {}): Layout {
  return merged(builtInLayout('three-columns', PLAIN_UNITS), changes) as Layout
}

function merged(base: unknown, changes: unknown): unknown {
  if (!isRecord(base) || !isRecord(changes)) return changes
  const names = Object.keys(changes)
  return { ...base, ...Object.fromEntries(names.map((name) => [name, merged(base[name], changes[name])])) }
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
}

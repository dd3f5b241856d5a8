import { InvalidArgumentError } from 'commander'
import type { BinContent } from '../../shared/histogram'
import type { IntakeSettings, JointIntakeSettings } from '../../shared/intake'

/** What `--columns` says about a file of one coordinate. */
export type ColumnChoice = Pick<IntakeSettings, 'layout' | 'value' | 'columns'>

/** What `--columns` says about a file of two coordinates. */
export type JointColumnChoice = Pick<JointIntakeSettings, 'layout' | 'value' | 'columns'>

const CONTENTS: readonly BinContent[] = ['count', 'density', 'probability']
const SKIPPED = 'skip'

/**
 * Names of the columns from the left, such as `centre,count`, `low,high,density`, `sample`; `skip` passes over one.
 */
export function columns(text: string): ColumnChoice {
  const names = text.split(',').map((name) => name.trim())
  refuseUnknown(names, ['centre', 'low', 'high', 'sample', ...CONTENTS])
  const at = (name: string) => names.indexOf(name)
  const value = contentIn(names)
  if (namesAre(names, ['sample'])) {
    const column = at('sample')
    return { layout: 'samples', value: 'count', columns: { low: column, high: column, value: column } }
  }
  if (value !== null && namesAre(names, ['centre', value])) {
    const column = at('centre')
    return { layout: 'centre', value, columns: { low: column, high: column, value: at(value) } }
  }
  if (value !== null && namesAre(names, ['low', 'high', value])) {
    return { layout: 'edges', value, columns: { low: at('low'), high: at('high'), value: at(value) } }
  }
  throw new InvalidArgumentError(
    'Name centre and a value, low, high and a value (count, density or probability), or sample.',
  )
}

/** Names of the columns of a two-dimensional file: `x,y,count` (or density, probability), or `x,y` for paired samples. */
export function jointColumns(text: string): JointColumnChoice {
  const names = text.split(',').map((name) => name.trim())
  refuseUnknown(names, ['x', 'y', ...CONTENTS])
  const value = contentIn(names)
  if (!namesAre(names, value === null ? ['x', 'y'] : ['x', 'y', value])) {
    throw new InvalidArgumentError(
      'Name x, y and a value (count, density or probability), or x, y for samples.',
    )
  }
  const [x, y] = [names.indexOf('x'), names.indexOf('y')]
  return {
    layout: value === null ? 'samples' : 'grid',
    value: value ?? 'count',
    columns: { x, y, value: value === null ? y : names.indexOf(value) },
  }
}

function contentIn(names: readonly string[]): BinContent | null {
  return CONTENTS.find((content) => names.includes(content)) ?? null
}

/** The names, in any order and each once, with columns passed over left out. */
function namesAre(names: readonly string[], wanted: readonly string[]): boolean {
  const named = names.filter((name) => name !== SKIPPED)
  return named.length === wanted.length && wanted.every((name) => named.includes(name))
}

function refuseUnknown(names: readonly string[], known: readonly string[]): void {
  const unknown = names.find((name) => name !== SKIPPED && !known.includes(name))
  if (unknown !== undefined) {
    throw new InvalidArgumentError(
      `A column called ${unknown} is not known; ${known.join(', ')} and skip are.`,
    )
  }
}

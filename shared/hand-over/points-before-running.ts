import type { HandOverLayout } from '../contracts/hand-over'
import { listWords } from '../mapping/list-words'
import { type CoordinateKind, DEGREES_PER_RADIAN, unitSymbol } from '../units'

/** What the points speak of. */
export interface PointsInput {
  readonly layout: Pick<HandOverLayout, 'length' | 'angle' | 'energy'>
  readonly tables: readonly {
    readonly name: string
    readonly kinds: readonly CoordinateKind[]
    readonly form: { readonly name: string; readonly formula: string; readonly parameters: string } | null
  }[]
  /** K */
  readonly temperature: number
  /** What a layout of its own conventions writes, in sentences; null for the house's: internal angles, cis at 0, forces −dU/dq. */
  readonly readings?: readonly string[] | null
}

/** What whoever runs the tables must know before they do, each with a word to find it by. */
export function pointsBeforeRunning({
  layout,
  tables,
  temperature,
  readings = null,
}: PointsInput): { title: string; text: string }[] {
  const joint = tables.filter(({ kinds }) => kinds.length === 2)
  return [
    ...(readings === null ? conventions(tables, layout) : [{ title: 'Layout', text: readings.join(' ') }]),
    ...(layout.energy === 'kT'
      ? [
          {
            title: 'Energies',
            text: `Energies are in kT at ${temperature} K, the temperature of the state point.`,
          },
        ]
      : []),
    ...forms(tables),
    ...(joint.length > 0
      ? [
          {
            title: joint.length === 1 ? 'Joint potential' : 'Joint potentials',
            text: `${listWords(joint.map(({ name }) => name.replace(' · ', ' with ')))} come${joint.length === 1 ? 's' : ''} as one grid. Use it instead of two single tables, never beside them.`,
          },
        ]
      : []),
    {
      title: 'State point',
      text: 'The tables hold at this one state point and for bonded terms only. Run a chain on them and compare its distributions before you rely on them.',
    },
  ]
}

/** How forces and coordinates of the house's own layouts are meant. */
function conventions(
  tables: PointsInput['tables'],
  layout: PointsInput['layout'],
): { title: string; text: string }[] {
  const has = (kind: CoordinateKind): boolean => tables.some(({ kinds }) => kinds.includes(kind))
  const turns = has('angle') || has('dihedral')
  const per = turns
    ? ` per ${unitSymbol(layout.length)} for bonds, per ${layout.angle} for angles and dihedrals`
    : ''
  const factor =
    layout.angle === 'degree'
      ? `Multiply by ${DEGREES_PER_RADIAN.toFixed(4)} if your engine reads radians.`
      : `Divide by ${DEGREES_PER_RADIAN.toFixed(4)} if your engine reads degrees.`
  const straight = layout.angle === 'degree' ? '180°' : 'π'
  const range = layout.angle === 'degree' ? '−180° to 180°' : '−π to π'
  return [
    { title: 'Forces', text: `Forces are −dU/dq${per}.${turns ? ` ${factor}` : ''}` },
    ...(has('angle')
      ? [
          {
            title: 'Angles',
            text: `An angle is the internal angle at the middle bead: ${straight} is straight.`,
          },
        ]
      : []),
    ...(has('dihedral')
      ? [
          {
            title: 'Dihedral zero',
            text: `0 is cis, the sign follows the right-hand rule, the range is ${range}.`,
          },
        ]
      : []),
  ]
}

/** Analytic forms are the place where a factor ½ gets lost. */
function forms(tables: PointsInput['tables']): { title: string; text: string }[] {
  return tables.flatMap(({ name, form }) =>
    form === null
      ? []
      : [
          {
            title: name,
            text: `The table follows ${form.formula}: ${form.parameters}.${form.formula.includes('½') ? ' The ½ is written out: an engine that leaves it out needs half of k.' : ''}`,
          },
        ],
  )
}

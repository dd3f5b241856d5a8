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
}

/** What whoever runs the tables must know before they do, each with a word to find it by. */
export function pointsBeforeRunning({
  layout,
  tables,
  temperature,
}: PointsInput): { title: string; text: string }[] {
  const has = (kind: CoordinateKind): boolean => tables.some(({ kinds }) => kinds.includes(kind))
  const joint = tables.filter(({ kinds }) => kinds.length === 2)
  const turns = has('angle') || has('dihedral')
  const per = turns
    ? ` per ${unitSymbol(layout.length)} for bonds, per ${layout.angle} for angles and dihedrals`
    : ''
  const factor =
    layout.angle === 'degree'
      ? `Multiply by ${DEGREES_PER_RADIAN.toFixed(4)} if your engine reads radians.`
      : `Divide by ${DEGREES_PER_RADIAN.toFixed(4)} if your engine reads degrees.`
  return [
    { title: 'Forces', text: `Forces are −dU/dq${per}.${turns ? ` ${factor}` : ''}` },
    ...(layout.energy === 'kT'
      ? [
          {
            title: 'Energies',
            text: `Energies are in kT at ${temperature} K, the temperature of the state point.`,
          },
        ]
      : []),
    ...forms(tables),
    ...(has('angle')
      ? [
          {
            title: 'Angles',
            text: `An angle is the internal angle at the middle bead: ${layout.angle === 'degree' ? '180°' : 'π'} is straight.`,
          },
        ]
      : []),
    ...(has('dihedral')
      ? [
          {
            title: 'Dihedral zero',
            text: `0 is cis, the sign follows the right-hand rule, the range is ${layout.angle === 'degree' ? '−180° to 180°' : '−π to π'}.`,
          },
        ]
      : []),
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

/** Where a field may stand: in header and footer of a table or of a joint table, or in the template of one of their rows. */
export type TemplatePlace = 'text' | 'row' | 'joint text' | 'joint row'

/** A field of the templates of a layout. */
export interface TemplateField {
  readonly name: string
  /**
   * value: written as it is, and as a section only where it is not empty; switch: a section only; list: a section repeated for each
   * item, which is `{{.}}` or has the fields of `items`.
   */
  readonly type: 'value' | 'switch' | 'list'
  readonly items?: readonly string[]
  readonly places: readonly TemplatePlace[]
  /** What it says, for people. */
  readonly about: string
  readonly example: string
}

const SINGLE: readonly TemplatePlace[] = ['text', 'row']
const JOINT: readonly TemplatePlace[] = ['joint text', 'joint row']
const ALL: readonly TemplatePlace[] = [...SINGLE, ...JOINT]

const value = (
  name: string,
  places: readonly TemplatePlace[],
  about: string,
  example: string,
): TemplateField => ({ name, type: 'value', places, about, example })
const flag = (name: string, places: readonly TemplatePlace[], about: string): TemplateField => ({
  name,
  type: 'switch',
  places,
  about,
  example: `{{#${name}}} … {{/${name}}}`,
})

const axisFields = (axis: 'x' | 'y'): TemplateField[] => [
  value(`${axis}Kind`, JOINT, `bond, angle or dihedral: what ${axis} is`, axis === 'x' ? 'bond' : 'angle'),
  value(`${axis}Rows`, JOINT, `number of values of ${axis}`, '101'),
  value(`${axis}Low`, JOINT, `first value of ${axis}, as written`, '0.2'),
  value(`${axis}High`, JOINT, `last value of ${axis}, as written`, '0.5'),
  value(`${axis}Step`, JOINT, `distance between two values of ${axis}`, '0.003'),
  value(`${axis}Unit`, JOINT, `unit of ${axis}`, axis === 'x' ? 'nm' : 'deg'),
  value(`${axis}ForceUnit`, JOINT, `unit of the force along ${axis}`, 'kJ/mol/nm'),
]

/** Every field of the templates, in the order of their description. */
export const TEMPLATE_FIELDS: readonly TemplateField[] = [
  value('polymer', ALL, 'name of the polymer', 'poly(n-hexyl acrylate)'),
  value('repeatUnit', ALL, 'its repeat unit as SMILES', '*CC(*)C(=O)OCCCCCC'),
  value('mapping', ALL, 'name and revision of the mapping', '3-to-1, revision 4'),
  value('term', ALL, 'name of the term; of a joint table both', 'B–E–H'),
  ...[1, 2, 3, 4].map((place) =>
    value(`type${place}`, SINGLE, `type of bead ${place} of the term; empty beyond its last`, 'B'),
  ),
  {
    name: 'types',
    type: 'list',
    places: ALL,
    about: 'bead types of the term in order; each is {{.}}',
    example: '{{#types}}{{.}} {{/types}}',
  },
  value('beadOrder', ALL, 'beads in the order the coordinate is measured, with their unit', 'B(0) E(0) H(0)'),
  value('statePoint', ALL, 'what names the state point beside the temperature', '1 bar, melt'),
  value('temperature', ALL, 'temperature in K', '400'),
  value('kT', ALL, 'kT at that temperature, in the energy unit of the table', '3.325785'),
  value('savedOn', ALL, 'day on which the inversion was saved', '2025-03-14'),
  value('handOver', ALL, 'number of the hand-over; empty outside one', '12'),
  value('inputName', ALL, 'name of the file the distribution came from', 'angle_B-E-H.txt'),
  value('inputSha256', ALL, 'SHA-256 of that file', '3f1c…'),
  value('kind', SINGLE, 'bond, angle or dihedral', 'angle'),
  flag('bond', SINGLE, 'a section that stands only in tables of a bond'),
  flag('angle', SINGLE, 'a section that stands only in tables of an angle'),
  flag('dihedral', SINGLE, 'a section that stands only in tables of a dihedral'),
  flag('invented', ALL, 'a section that stands only where the data are made up'),
  value('rows', ALL, 'number of rows', '1000'),
  value('intervals', SINGLE, 'number of steps between the first and the last row', '999'),
  value('low', SINGLE, 'first coordinate, as written', '0'),
  value('high', SINGLE, 'last coordinate, as written', '180'),
  value('step', SINGLE, 'distance between two rows', '0.1801802'),
  value('lowestAt', SINGLE, 'coordinate of the row of least energy', '112.4324'),
  value('lowestEnergy', ALL, 'least energy of the rows', '0'),
  value('highestEnergy', ALL, 'highest energy of the rows', '61.73205'),
  value('coordinateUnit', SINGLE, 'unit of the coordinate', 'deg'),
  value('energyUnit', ALL, 'unit of the energy; of a joint table that of x', 'kJ/mol'),
  value('forceUnit', SINGLE, 'unit of force and derivative', 'kJ/mol/deg'),
  ...axisFields('x'),
  ...axisFields('y'),
  value(
    'columnNames',
    ALL,
    'names and units of the columns, as wide as they are',
    'coordinate[deg] energy[kJ/mol]',
  ),
  value('comment', ALL, 'the comment sign', '#'),
  {
    name: 'comments',
    type: 'list',
    places: ALL,
    about:
      'lines that say what the table is and how it was made, without comment sign; each is {{.}}. Empty without a comment sign',
    example: '{{#comments}}\n{{comment}} {{.}}\n{{/comments}}',
  },
  {
    name: 'warnings',
    type: 'list',
    items: ['code', 'message'],
    places: ALL,
    about: 'warnings about the inversion; each has {{code}} and {{message}}',
    example: '{{#warnings}}{{code}} {{/warnings}}',
  },
  value('row', ['row', 'joint row'], 'number of the row', '1'),
  value('coordinate', ['row'], 'coordinate, in its number format', '112.4324'),
  value('x', ['joint row'], 'first coordinate', '0.2'),
  value('y', ['joint row'], 'second coordinate', '112.4'),
  value('energy', ['row', 'joint row'], 'energy', '0.0123'),
  value('force', ['row'], '−dU/d(coordinate)', '-0.25'),
  value('derivative', ['row'], 'dU/d(coordinate)', '0.25'),
  ...(['x', 'y'] as const).flatMap((axis) => [
    value(`${axis}Force`, ['joint row'], `−∂U/∂${axis}`, '-0.25'),
    value(`${axis}Derivative`, ['joint row'], `∂U/∂${axis}`, '0.25'),
  ]),
  flag('first', ['row', 'joint row'], 'a section that stands only in the first row'),
  flag('last', ['row', 'joint row'], 'a section that stands only in the last row'),
  flag('blockEnd', ['joint row'], 'a section that stands only where the outer coordinate changes next'),
]

/** Fields that may stand at a place, by name. */
export function fieldsAt(place: TemplatePlace): ReadonlyMap<string, TemplateField> {
  return new Map(
    TEMPLATE_FIELDS.filter(({ places }) => places.includes(place)).map((field) => [field.name, field]),
  )
}

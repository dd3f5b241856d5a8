import type { JointTable } from '../joint-potential'
import { energyScale, unitWord } from '../units'
import { headLine, unitWords } from './column-names'
import { plainValue } from './format-value'
import { jointColumnName, jointFormat } from './joint-cells'
import type { JointLayoutValues } from './joint-values'
import { kindLayout, type Layout } from './layout'
import { plainNumbers } from './layout-cells'
import type { LayoutFields } from './layout-fields'
import { commonView, SHORT, thermalView } from './layout-view'
import type { TemplateView } from './render-template'

/** Every field that header, row and footer of a joint table may use, save those of a row. */
export function jointView(
  table: JointTable,
  layout: Layout,
  values: JointLayoutValues,
  fields: LayoutFields,
): TemplateView {
  const { kinds, temperature } = table
  const { coordinate, energy } = plainNumbers(layout)
  const { energyUnit } = kindLayout(layout, kinds[0])
  const ofAxis = (axis: 0 | 1): [string, string | number][] => {
    const { written, kind } = values.axes[axis]
    const name = axis === 0 ? 'x' : 'y'
    const last = written.length - 1
    const words = unitWords(layout, kind)
    return [
      [`${name}Kind`, kind],
      [`${name}Rows`, String(written.length)],
      [`${name}Low`, coordinate(written[0])],
      [`${name}High`, coordinate(written[last])],
      [`${name}Step`, plainValue((written[last] - written[0]) / last, SHORT)],
      [`${name}Unit`, words.coordinate],
      [`${name}ForceUnit`, words.force],
    ]
  }
  return {
    ...commonView(layout, fields),
    ...thermalView(temperature, energyScale(energyUnit, temperature)),
    ...Object.fromEntries([...ofAxis(0), ...ofAxis(1)]),
    rows: String(values.energies.length),
    lowestEnergy: energy(values.energies.reduce((least, value) => Math.min(least, value), Infinity)),
    highestEnergy: energy(values.energies.reduce((most, value) => Math.max(most, value), -Infinity)),
    energyUnit: unitWord(energyUnit),
    columnNames: headLine(
      layout,
      layout.joint.columns.map((quantity) => ({
        name: jointColumnName(layout, table, quantity),
        width: quantity === 'row' ? layout.numbers.row.width : jointFormat(layout, quantity).width,
      })),
    ),
  }
}

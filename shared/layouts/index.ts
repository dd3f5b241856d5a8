export {
  BUILT_IN_LAYOUTS,
  type BuiltInKey,
  type BuiltInLayout,
  builtInLayout,
  DEFAULT_BUILT_IN,
  type LayoutUnits,
} from './built-in-layouts'
export { checkLayout } from './check-layout'
export {
  type AngleLayout,
  type BondLayout,
  type DihedralLayout,
  type JointLayout,
  type JointQuantity,
  type KindLayout,
  type Layout,
  LAYOUT_LIMITS,
  type LayoutQuantity,
  type NumberFormat,
} from './layout'
export { type LayoutFields, NO_FIELDS } from './layout-fields'
export { TABLE_JSON_FORMAT, TABLE_JSON_VERSION } from './layout-json'
export { type LayoutWording, layoutWording } from './layout-wording'
export type { BeyondTable, CurvePoint } from './table-curve'
export { TEMPLATE_FIELDS, type TemplateField, type TemplatePlace } from './template-fields'
export { layoutRows, writeLayout } from './write-layout'

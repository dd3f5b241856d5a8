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
export { JOINT_JSON_FORMAT } from './joint-json'
export { TABLE_JSON_FORMAT, TABLE_JSON_VERSION } from './layout-json'
export { layoutSentences } from './layout-sentences'
export {
  jointLayoutWording,
  type JointLayoutWording,
  type LayoutWording,
  layoutWording,
} from './layout-wording'
export type { LayoutCheck, LayoutCheckCode } from './layout-check'
export { layoutChecks } from './layout-checks'
export type { BeyondTable, CurvePoint } from './table-curve'
export { TEMPLATE_FIELDS, type TemplateField, type TemplatePlace } from './template-fields'
export {
  type JointAbout,
  type TableAbout,
  writeJointTableInLayout,
  writeTableInLayout,
} from './write-table-in-layout'
export { layoutRows, writeLayout } from './write-layout'
export { jointLayoutRows, writeJointLayout } from './write-joint-layout'

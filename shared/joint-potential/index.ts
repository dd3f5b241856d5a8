export { formatJointRows, formatJointTable } from './format-joint-table'
export { type JointKnots, jointPotential, type JointPotential, type JointSmoothing } from './joint-potential'
export {
  DEFAULT_JOINT_SETTINGS,
  type JointPotentialSettings,
  type JointSmoothingSettings,
} from './joint-potential-settings'
export type { JointWarning, JointWarningCode } from './joint-potential-warnings'
export { type JointAxis, jointEnergy, jointSlopes, type JointSurface } from './joint-surface'
export {
  DEFAULT_JOINT_ROWS,
  DEFAULT_JOINT_TABLE,
  JOINT_ROWS,
  jointTable,
  type JointTable,
  type JointTableAxis,
  type JointTableRow,
  jointTableRows,
  type JointTableSettings,
  type JointTableUnits,
} from './joint-table'
export { type JointTableCommentInput, jointTableComments } from './joint-table-comments'

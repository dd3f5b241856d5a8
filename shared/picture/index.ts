export { lightTokens } from './light-tokens'
export { type Picture, PICTURE_FONTS, svgDocument } from './picture'
export {
  italic,
  svgElement,
  svgEscape,
  svgFormula,
  svgNumber,
  svgPath,
  type Svg,
  type SvgAttributes,
} from './svg-writer'
export { brokenLines, textWidth } from './text-width'

/** The eleven stops --seq-0 to --seq-10 of assets/tokens.css in their light values. A test holds the two together. */
export const MAP_INKS = [
  '#FDFBF7',
  '#D4E5F3',
  '#B1CDEC',
  '#94B4E1',
  '#7E9BD1',
  '#6E82BB',
  '#606AA0',
  '#525481',
  '#434062',
  '#332D45',
  '#221B2E',
] as const

/** The ink of a share from 0 to 1. */
export function mapInk(share: number): string {
  return MAP_INKS[Math.round(Math.min(1, Math.max(0, share)) * (MAP_INKS.length - 1))]
}

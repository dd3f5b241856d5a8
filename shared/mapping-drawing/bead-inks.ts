import type { BeadColour } from '../mapping'

/** The colours that a bead is drawn in. */
interface BeadInk {
  readonly fill: string
  readonly edge: string
  readonly halo: string
  readonly letter: string
}

/**
 * The light tokens of assets/tokens.css for beads, which a picture is drawn in whatever the theme on screen. A test holds the two
 * together.
 */
export const BEAD_INKS: Readonly<Record<BeadColour, BeadInk>> = {
  blue: { fill: '#0072B2', edge: '#0072B2', halo: '#BBD8E5', letter: '#FFFFFF' },
  orange: { fill: '#E69F00', edge: '#B98113', halo: '#F7E4B7', letter: '#120E0A' },
  purple: { fill: '#CC79A7', edge: '#C573A1', halo: '#F0DAE2', letter: '#120E0A' },
  sky: { fill: '#56B4E9', edge: '#3294C8', halo: '#D2E9F3', letter: '#120E0A' },
  yellow: { fill: '#F0E442', edge: '#999017', halo: '#FAF6C8', letter: '#120E0A' },
  green: { fill: '#009E73', edge: '#009E73', halo: '#BBE4D5', letter: '#120E0A' },
  vermilion: { fill: '#D55E00', edge: '#D55E00', halo: '#F3D3B7', letter: '#120E0A' },
  black: { fill: '#000000', edge: '#000000', halo: '#DAD8D3', letter: '#FFFFFF' },
}

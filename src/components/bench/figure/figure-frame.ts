/** A panel of the figure in pixels. */
export interface Panel {
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
}

/** Where everything of the bench figure stands: two panels and the spine between them, under the upper one the residual. */
export interface FigureFrame {
  readonly width: number
  readonly height: number
  readonly distribution: Panel
  /** Strip between distribution and spine; null while it is not shown. */
  readonly residual: Panel | null
  readonly potential: Panel
  /** Top of the spine, which reaches to the top of the potential. */
  readonly spineTop: number
  /** Base line of the labels in the spine. */
  readonly labelBaseline: number
  /** Narrow figures put the coordinate's name left of the spine, wide ones right of it. */
  readonly narrow: boolean
}

export const SPINE_HEIGHT = 38
/** Height of the residual's strip and the air above it. */
export const RESIDUAL_HEIGHT = 46
const RESIDUAL_GAP = 8
const TOP = 6
/** Holds the rings of the basins and what stands under them. */
const BOTTOM = 30
/** Part of the panels' height that the distribution takes. */
const DISTRIBUTION_SHARE = 0.41
export const NARROW_BELOW = 480

/**
 * The frame for a figure of the given size: margins hold axis labels, the panels share what is left.
 *
 * @param residual whether the residual's strip stands between distribution and spine
 */
export function figureFrame(width: number, height: number, residual = false): FigureFrame {
  const narrow = width < NARROW_BELOW
  const left = narrow ? 48 : 56
  const right = narrow ? 28 : 56
  const inner = Math.max(1, Math.round(width) - left - right)
  const strip = residual ? RESIDUAL_GAP + RESIDUAL_HEIGHT : 0
  const panels = Math.max(2, Math.round(height) - TOP - strip - SPINE_HEIGHT - BOTTOM)
  const upper = Math.round(panels * DISTRIBUTION_SHARE)
  const spineTop = TOP + upper + strip
  return {
    width: Math.round(width),
    height: Math.round(height),
    distribution: { left, top: TOP, width: inner, height: upper },
    residual: residual
      ? { left, top: spineTop - RESIDUAL_HEIGHT, width: inner, height: RESIDUAL_HEIGHT }
      : null,
    potential: { left, top: spineTop + SPINE_HEIGHT, width: inner, height: panels - upper },
    spineTop,
    labelBaseline: spineTop + 23.2,
    narrow,
  }
}

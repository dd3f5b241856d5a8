import type { Correlation } from '@shared/correlation'
import { MAP_RAMPS } from '@/assets/map-ramps'
import { captionSentences, captionText, type FigureCaption } from '@/components/figure/figure-caption'
import { type Picture, svgElement } from '@shared/picture'
import type { PairNames } from '../verdict-words'
import { couplingCells, densityCells } from './map-cells'
import { mapFrame } from './map-frame'
import { mapMarks } from './map-marks'
import type { MapModel } from './map-model'
import { mapAxes } from './map-picture-axes'
import { mapKey } from './map-picture-key'
import { mapLayers } from './map-picture-layers'
import type { MapView } from './map-view'

const WIDTH = 760
const MARGIN = 20
const FIGURE_HEIGHT = 690
const GAP = 12

/**
 * The map with the distributions beside it as a picture that stands alone: axes, key, caption. It is laid out anew from the
 * model, so that the size of the window does not matter.
 */
export function mapPicture(
  correlation: Correlation,
  model: MapModel,
  view: MapView,
  names: PairNames,
  caption: FigureCaption,
): Picture {
  const width = WIDTH - 2 * MARGIN
  const frame = mapFrame(width, FIGURE_HEIGHT)
  const marks = mapMarks(frame, model)
  const steps = MAP_RAMPS.light[view].length
  const cells = view === 'density' ? densityCells(model, steps) : couplingCells(correlation, model, steps)
  const key = mapKey(correlation, model, view)
  const keyTop = MARGIN + frame.height + GAP
  const captionTop = keyTop + key.height + GAP
  const text = captionText(caption, MARGIN, captionTop, width)
  return {
    width: WIDTH,
    height: captionTop + text.height + MARGIN,
    title: captionSentences(caption)[0],
    body: [
      svgElement(
        'g',
        { transform: `translate(${MARGIN} ${MARGIN})` },
        mapLayers(frame, model, marks, cells, view),
        mapAxes(frame, model, marks, names),
      ),
      svgElement('g', { transform: `translate(${MARGIN} ${keyTop})` }, key.body),
      text.body,
    ].join(''),
  }
}

import { captionSentences, captionText, type FigureCaption } from '@/components/figure/figure-caption'
import { type Picture, svgElement } from '@shared/picture'
import { axisMarks } from './axis-marks'
import type { BasinSign } from './basin-signs'
import { emptyBrackets } from './empty-brackets'
import { figureFrame } from './figure-frame'
import type { FigureModel } from './figure-model'
import type { VisibleCurves } from './visible-curves'
import { pictureAxes, pictureGrounds } from './picture-axes'
import { pictureBasins } from './picture-basins'
import { pictureCurves } from './picture-curves'
import { pictureKey } from './picture-key'

const WIDTH = 760
const MARGIN = 20
const FIGURE_HEIGHT = 560
const GAP = 10
const RESIDUAL_REMARK = 'Residual: (n\u00a0−\u00a0expected)/√expected of the independent samples'

/**
 * The bench figure as a picture that stands alone: key, both panels on their shared axis, caption. It is laid out anew from
 * the model, so that the size of the window does not matter.
 */
export function benchPicture(
  model: FigureModel,
  basins: readonly BasinSign[],
  visible: VisibleCurves,
  jacobian: boolean,
  caption: FigureCaption,
): Picture {
  const width = WIDTH - 2 * MARGIN
  const residual = visible.residual && model.bins.residuals !== null
  const frame = figureFrame(width, FIGURE_HEIGHT, residual)
  const marks = axisMarks(frame, model)
  const empty = emptyBrackets(model.empty, model.bins.edges, marks.x)
  const key = pictureKey(model, visible, jacobian, width)
  const figureTop = MARGIN + key.height + GAP
  const captionTop = figureTop + FIGURE_HEIGHT + GAP
  const remarks = residual ? [...caption.remarks, RESIDUAL_REMARK] : caption.remarks
  const text = captionText({ ...caption, remarks }, MARGIN, captionTop, width)
  return {
    width: WIDTH,
    height: captionTop + text.height + MARGIN,
    title: captionSentences(caption)[0],
    body: [
      svgElement('g', { transform: `translate(${MARGIN} ${MARGIN})` }, key.body),
      svgElement(
        'g',
        { transform: `translate(${MARGIN} ${figureTop})` },
        pictureGrounds(frame, marks),
        pictureCurves(frame, model, marks, visible),
        pictureAxes(frame, model, marks, empty),
        pictureBasins(frame, marks, basins),
      ),
      text.body,
    ].join(''),
  }
}

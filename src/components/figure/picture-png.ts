import { svgDocument, type Picture } from '@shared/picture'
import { pictureFontRules } from './picture-fonts'

/** Dots per CSS pixel: fine enough for a slide and for two columns of a page. */
export const PNG_SCALE = 2

/**
 * The picture as a PNG: its SVG document drawn by the browser. The document goes in as a data address, which the content
 * policy allows for images.
 */
export async function pngOf(picture: Picture): Promise<Blob> {
  const image = new Image()
  const drawing = svgDocument(picture, await pictureFontRules())
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(drawing)}`
  await image.decode()
  const canvas = document.createElement('canvas')
  canvas.width = picture.width * PNG_SCALE
  canvas.height = picture.height * PNG_SCALE
  await drawWhole(image, canvas)
  return new Promise((resolve, reject) => {
    canvas.toBlob((blob) => {
      if (blob === null) reject(new Error('The canvas gave no picture.'))
      else resolve(blob)
    }, 'image/png')
  })
}

/** So many drawings in a row must be equal. */
const STEADY = 3
/** A picture that never rests is taken as it is. */
const MOST_DRAWINGS = 30

/**
 * Draws until the picture rests. A browser calls an image complete before the fonts in it have arrived, and nothing says when
 * they have: until then their letters are missing.
 */
async function drawWhole(image: HTMLImageElement, canvas: HTMLCanvasElement): Promise<void> {
  const context = canvas.getContext('2d', { willReadFrequently: true })
  if (context === null) throw new Error('This browser offers no canvas to draw on.')
  let equal = 1
  let before: Uint32Array | null = null
  for (let drawing = 0; drawing < MOST_DRAWINGS && equal < STEADY; drawing += 1) {
    context.drawImage(image, 0, 0, canvas.width, canvas.height)
    const pixels = new Uint32Array(context.getImageData(0, 0, canvas.width, canvas.height).data.buffer)
    equal = before?.every((pixel, index) => pixel === pixels[index]) === true ? equal + 1 : 1
    before = pixels
    await new Promise(requestAnimationFrame)
  }
}

import { ref, type Ref } from 'vue'
import { svgDocument, type Picture } from '@shared/picture'
import { pngOf } from '@/components/figure/picture-png'
import { saveFile } from '@/components/figure/save-file'

/** A figure that can leave the product; made when it is asked for. */
export interface FigureFiles {
  /** Of the files, without ending. */
  readonly name: () => string
  readonly picture: () => Picture
  readonly csv: () => string
}

export type FigureFormat = 'svg' | 'png' | 'csv'

/** Saves a figure as a file, and says when a browser could not draw it. */
export interface FigureExport {
  readonly failed: Readonly<Ref<boolean>>
  readonly save: (files: FigureFiles, format: FigureFormat) => Promise<void>
}

/** Writes the files of a figure. Only the PNG can fail: it needs the browser to draw. */
export function useFigureExport(): FigureExport {
  const failed = ref(false)
  const save = async (files: FigureFiles, format: FigureFormat): Promise<void> => {
    failed.value = false
    try {
      saveFile(`${files.name()}.${format}`, await contentOf(files, format))
    } catch {
      failed.value = true
    }
  }
  return { failed, save }
}

async function contentOf(files: FigureFiles, format: FigureFormat): Promise<Blob> {
  if (format === 'png') return pngOf(files.picture())
  if (format === 'csv') return new Blob([files.csv()], { type: 'text/csv;charset=utf-8' })
  return new Blob([svgDocument(files.picture())], { type: 'image/svg+xml;charset=utf-8' })
}

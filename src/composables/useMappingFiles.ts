import { computed, shallowRef, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { RepeatUnit } from '@shared/chemistry'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer } from '@shared/contracts/polymer'
import {
  importMappingFile,
  type MappingFileError,
  readMappingFile,
  writeMappingFile,
} from '@shared/documents'
import type { MappingDocument } from '@shared/mapping'
import { fileNameOf } from '@/components/figure/file-name'
import { saveFile } from '@/components/figure/save-file'
import { type BoardLayout, mappingPicture } from '@shared/mapping-drawing'
import { mappingCsv } from '@/components/mapping/picture/mapping-csv'
import type { FigureFiles } from './useFigureExport'

/** What the files of a mapping are made from. */
export interface MappingFilesSource {
  readonly polymer: () => Polymer | null
  readonly mapping: Mapping
  readonly unit: Ref<RepeatUnit>
  readonly layout: Ref<BoardLayout>
  readonly document: Ref<MappingDocument>
  /** Takes an imported mapping in place of what is painted. */
  readonly adopt: (document: MappingDocument) => void
}

/** The mapping as files, out and in. */
export interface MappingFiles {
  /** The drawing and the table of the beads. */
  readonly figure: ComputedRef<FigureFiles>
  /** Saves the mapping file. */
  readonly write: () => void
  /** Reads a mapping file and takes it over, or says what is wrong with it. */
  readonly read: (file: File) => Promise<void>
  readonly errors: ShallowRef<readonly MappingFileError[]>
  /** What should be known about the last import. */
  readonly notes: ShallowRef<readonly string[]>
}

/** Mapping files and pictures of the mapping on the board. */
export function useMappingFiles(source: MappingFilesSource): MappingFiles {
  const { mapping, unit, layout, document } = source
  const errors = shallowRef<readonly MappingFileError[]>([])
  const notes = shallowRef<readonly string[]>([])
  const name = (): string => fileNameOf(source.polymer()?.name ?? '', mapping.name)
  const caption = () => ({
    polymer: source.polymer()?.name ?? '',
    mapping: mapping.name,
    invented: source.polymer()?.demo ?? false,
  })

  const figure = computed<FigureFiles>(() => ({
    name,
    picture: () => mappingPicture(unit.value, layout.value, document.value, caption()),
    csv: () => mappingCsv(unit.value, document.value, caption()),
  }))
  const write = (): void => {
    const text = writeMappingFile(unit.value, document.value, mapping.name)
    saveFile(`${name()}.json`, new Blob([text], { type: 'application/json' }))
  }
  const read = async (file: File): Promise<void> => {
    errors.value = []
    notes.value = []
    const reading = readMappingFile(await file.text())
    const imported = reading.ok ? await importMappingFile(reading.file, unit.value) : reading
    if (!imported.ok) {
      errors.value = imported.errors
      return
    }
    notes.value = [`${file.name} is on the board; Undo brings back what was painted.`, ...imported.notes]
    source.adopt(imported.document)
  }
  return { figure, write, read, errors, notes }
}

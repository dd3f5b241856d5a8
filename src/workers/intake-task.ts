import type { BlockKind } from '@shared/histogram'
import type { CoordinateKind } from '@shared/units'
import {
  type BlockFiles,
  MAX_FILE_BYTES,
  NO_BLOCK_FILES,
  previewDistribution,
  previewJointDistribution,
  type DistributionPreview,
  type IntakePreview,
  type IntakeSettings,
  type JointIntakeSettings,
  type JointPreview,
} from '@shared/intake'

/** Files of time blocks or of chains that come with a distribution. */
export interface BlockFilesTask {
  readonly kind: BlockKind
  readonly files: readonly File[]
  /** The main file is the first block, and the distribution the sum of all. */
  readonly isFirst: boolean
}

/** What a file is to be read as: the distribution of one coordinate, or of two. null has the settings guessed. */
export type IntakeTask =
  | {
      readonly kinds: readonly [CoordinateKind]
      readonly settings: IntakeSettings | null
      readonly blocks?: BlockFilesTask | null
    }
  | {
      readonly kinds: readonly [CoordinateKind, CoordinateKind]
      readonly settings: JointIntakeSettings | null
    }

/** A file as it would be stored, and, when it is refused, the line that is to blame. */
export interface IntakeAnswer {
  readonly single: DistributionPreview | null
  readonly joint: JointPreview | null
  readonly badLine: string | null
}

/** Signs of a bad line that are shown. */
const SHOWN_SIGNS = 400

const tooLarge: IntakePreview<never, never> = {
  settings: null,
  reasons: [],
  notes: [],
  firstLines: [],
  columnCount: 0,
  columnNames: null,
  histogram: null,
  error: {
    code: 'FILE_TOO_LARGE',
    message: `The file is larger than ${MAX_FILE_BYTES / 2 ** 20} MB.`,
    place: {},
  },
}

const texts = new Map<number, Promise<string>>()

/** The line of a text, counted from 1, cut where it is very long. */
export function lineOf(text: string, line: number): string | null {
  let start = 0
  for (let passed = 1; passed < line; passed += 1) {
    const end = text.indexOf('\n', start)
    if (end < 0) return null
    start = end + 1
  }
  const end = text.indexOf('\n', start)
  return text
    .slice(start, end < 0 ? undefined : end)
    .slice(0, SHOWN_SIGNS)
    .trimEnd()
}

/** Reads a file as asked. Its text is kept under `id` until `forgetFile`, so that a changed setting needs no second reading. */
export async function readFile(id: number, file: Blob, task: IntakeTask): Promise<IntakeAnswer> {
  const single = task.kinds.length === 1
  if (file.size > MAX_FILE_BYTES) {
    return { single: single ? tooLarge : null, joint: single ? null : tooLarge, badLine: null }
  }
  const reading = texts.get(id) ?? file.text()
  texts.set(id, reading)
  return readText(await reading, task, await readBlockFiles(task))
}

/** The texts of the block files of a task. */
export async function readBlockFiles(task: IntakeTask): Promise<BlockFiles> {
  const blocks = 'blocks' in task ? task.blocks : null
  if (!blocks) return NO_BLOCK_FILES
  const texts = await Promise.all(
    blocks.files.map(async (file) => ({ name: file.name, text: await file.text() })),
  )
  return { ...NO_BLOCK_FILES, [blocks.kind]: texts, firstOf: blocks.isFirst ? blocks.kind : null }
}

/** Reads the text of a file as asked; whatever is wrong with it is part of the answer. */
export function readText(
  text: string,
  task: IntakeTask,
  blockFiles: BlockFiles = NO_BLOCK_FILES,
): IntakeAnswer {
  const isSingle = (given: IntakeTask): given is Extract<IntakeTask, { kinds: readonly [CoordinateKind] }> =>
    given.kinds.length === 1
  const single = isSingle(task) ? previewDistribution(text, task.kinds[0], task.settings, blockFiles) : null
  const joint = isSingle(task) ? null : previewJointDistribution(text, task.kinds, task.settings)
  const line = (single ?? joint)?.error?.place.line
  return { single, joint, badLine: line === undefined ? null : lineOf(text, line) }
}

/** Lets go of a file's text. */
export function forgetFile(id: number): void {
  texts.delete(id)
}

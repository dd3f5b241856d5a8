import { z } from 'zod'
import { angleUnitSchema, energyUnitSchema, lengthUnitSchema, nameSchema } from './common'
import { releasedFileSchema } from './hand-over-desk'
import { layoutDocumentSchema, layoutRefSchema } from './layout'

/** Rows that a recipient's own layout may ask for at most. */
export const MAX_OWN_ROWS = 5000

/** Characters of the row template of such a layout: it is written out for every row of every table. */
export const MAX_OWN_ROW_TEMPLATE = 500

/** Query of a download. Without a layout: the file as it was released, byte for byte. */
export const writingQuerySchema = z.object({
  layout: layoutRefSchema.optional(),
  /** For layouts of the house; those of the group have their own units. Left out: the units of the release. */
  length: lengthUnitSchema.optional(),
  angle: angleUnitSchema.optional(),
  energy: energyUnitSchema.optional(),
})
export type WritingQuery = z.infer<typeof writingQuerySchema>

/** The same of one file, by its path in the release. */
export const fileQuerySchema = writingQuerySchema.extend({ path: z.string().min(1).max(300) })

/** A layout of a recipient's own. */
export const ownLayoutSchema = z
  .object({ name: nameSchema, document: layoutDocumentSchema })
  .meta({ id: 'OwnLayout' })
export type OwnLayout = z.infer<typeof ownLayoutSchema>

export const ownFileSchema = ownLayoutSchema
  .extend({ path: z.string().min(1).max(300) })
  .meta({ id: 'OwnFile' })

/** What a layout makes of the tables: names, sizes and checksums as a download gives them, with the first lines. */
export const writtenSchema = z
  .object({
    layout: z.string(),
    archive: z.object({ fileName: z.string(), size: z.number().int(), sha256: z.string() }),
    files: z.array(releasedFileSchema),
    tables: z.array(
      z.object({ name: z.string(), path: z.string(), written: z.string(), firstLines: z.array(z.string()) }),
    ),
  })
  .meta({ id: 'Written' })
export type Written = z.infer<typeof writtenSchema>

import { z } from 'zod'
import { coordinateKindSchema } from './common'

/** A line of a sheet with a word to find it by. */
export const sheetLineSchema = z.object({ title: z.string(), text: z.string() })
export type SheetLine = z.infer<typeof sheetLineSchema>

const numbers = z.array(z.number())
const spanSchema = z.tuple([z.number(), z.number()])

/** A bead as a glyph draws it; `colour` is its place in the order of bead colours, null for one that is gone. */
const glyphBeadSchema = z.object({ name: z.string(), colour: z.number().int().nullable() })
export type SheetGlyphBead = z.infer<typeof glyphBeadSchema>

/** What the figure of a single table draws, in the units of the files; densities per coordinate unit. */
export const curveFigureSchema = z.object({
  kind: coordinateKindSchema,
  coordinateUnit: z.string(),
  energyUnit: z.string(),
  /** Shown part of the axis, and the part of it that holds data. */
  shown: spanSchema,
  populated: spanSchema,
  /** Energy that the axis ends at. */
  limit: z.number(),
  /** Edges of the bins, one more than there are densities. */
  edges: numbers,
  measured: numbers,
  /** The distribution that the table stands for. */
  regenerated: numbers,
  /** Bin by bin, null for an empty bin; on the same constant as the potential. */
  raw: z.array(z.number().nullable()),
  /** Half width of the 95 % band of U − U_min at the middle of each bin, null where nothing is known; null without a sample size. */
  band: z.array(z.number().nullable()).nullable(),
  potential: z.object({ coordinates: numbers, energies: numbers }),
})
export type CurveFigure = z.infer<typeof curveFigureSchema>

/** What the figure of a joint table draws: two maps on one grid of cells, row-major, x first. */
export const mapFigureSchema = z.object({
  kinds: z.tuple([coordinateKindSchema, coordinateKindSchema]),
  names: z.tuple([z.string(), z.string()]),
  coordinateUnits: z.tuple([z.string(), z.string()]),
  x: spanSchema,
  y: spanSchema,
  columns: z.number().int(),
  rows: z.number().int(),
  /** Measured probability of each cell relative to the largest. */
  measured: numbers,
  /** U in kT above the least. */
  energies: numbers,
})
export type MapFigure = z.infer<typeof mapFigureSchema>

/** How the numbers of a table came about; null where there is no such number. */
const sheetNumbersSchema = z.object({
  samples: z.number().nullable(),
  inefficiency: z.number().nullable(),
  /** log₁₀ λ, one for each axis; null for an unsmoothed table. */
  log10Lambda: numbers.nullable(),
  effectiveDimension: z.number().nullable(),
  basins: z.number().int().nullable(),
  input: z.object({ name: z.string(), sha256: z.string() }),
})
export type SheetNumbers = z.infer<typeof sheetNumbersSchema>

/** A table of a hand-over as the sheet lists it. */
export const sheetTableSchema = z.object({
  name: z.string(),
  kinds: z.array(coordinateKindSchema),
  /** One or two rows of beads. */
  beads: z.array(z.array(glyphBeadSchema)),
  path: z.string(),
  size: z.number().int(),
  sha256: z.string(),
  /** As text, one for each axis. */
  domain: z.array(z.string()),
  rows: z.string(),
  lowest: z.string(),
  silhouette: numbers,
  numbers: sheetNumbersSchema,
  curve: curveFigureSchema.nullable(),
  map: mapFigureSchema.nullable(),
  /** What stands under the figure. */
  caption: z.string(),
})
export type SheetTable = z.infer<typeof sheetTableSchema>

const sheetVerdictSchema = z.object({
  name: z.string(),
  verdict: z.string(),
  /** Corrected mutual information in nats. */
  information: z.string(),
  pValue: z.string(),
  samples: z.string(),
  decision: z.string(),
})

const sheetWarningSchema = z.object({ about: z.string(), message: z.string(), answer: z.string() })

/**
 * The data sheet of a released hand-over (document version 1): everything that screen, print and PDF say of it, worded once and
 * frozen as data-sheet.json.
 */
export const dataSheetSchema = z
  .object({
    format: z.literal('beadwright data sheet'),
    version: z.literal(1),
    number: z.number().int(),
    title: z.string(),
    polymer: z.string(),
    /** After the name of the polymer. */
    subtitle: z.string(),
    group: z.string(),
    invented: z.boolean(),
    releasedAt: z.string(),
    facts: z.array(sheetLineSchema),
    notes: z.string(),
    beads: z.object({
      rows: z.array(
        z.object({
          name: z.string(),
          colour: z.number().int(),
          label: z.string(),
          formula: z.string(),
          mass: z.string(),
        }),
      ),
      unit: z.object({ formula: z.string(), mass: z.string(), smiles: z.string() }),
      /** The mapping as an SVG document. */
      drawing: z.string(),
    }),
    beforeYouRun: z.array(sheetLineSchema),
    tables: z.array(sheetTableSchema),
    leftOut: z.array(
      z.object({
        name: z.string(),
        kind: coordinateKindSchema,
        beads: z.array(glyphBeadSchema),
        reason: z.string(),
      }),
    ),
    firstLines: z.object({ path: z.string(), lines: z.array(z.string()) }).nullable(),
    carry: z.array(sheetLineSchema),
    forms: z.array(sheetLineSchema),
    verdicts: z.array(sheetVerdictSchema),
    warnings: z.array(sheetWarningSchema),
    changed: z.object({ since: z.number().int(), lines: z.array(sheetLineSchema) }).nullable(),
    methods: z.array(sheetLineSchema),
    references: z.array(z.string()),
    signOff: z.array(sheetLineSchema),
    /** SHA-256 of the lines of SHA256SUMS that name the tables. */
    tablesSha256: z.string(),
  })
  .meta({ id: 'DataSheet' })
export type DataSheet = z.infer<typeof dataSheetSchema>

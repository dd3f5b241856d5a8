import { z } from 'zod'
import { BUILT_IN_LAYOUTS } from '../layouts/built-in-layouts'
import { LAYOUT_LIMITS } from '../layouts/layout'
import {
  angleUnitSchema,
  coordinateKindSchema,
  energyUnitSchema,
  idSchema,
  lengthUnitSchema,
  nameSchema,
  personSchema,
  timestampSchema,
} from './common'

const { digits, width, rows, commentLength, templateLength, rowTemplateLength } = LAYOUT_LIMITS

const within = ({ low, high }: { readonly low: number; readonly high: number }) =>
  z
    .number({ error: 'Give a number.' })
    .int('Give a whole number.')
    .min(low, `Give a whole number from ${low} to ${high}.`)
    .max(high, `Give a whole number from ${low} to ${high}.`)

const widthSchema = within(width)

export const numberFormatSchema = z
  .strictObject({
    style: z.enum(['shortest', 'fixed', 'scientific']),
    digits: within(digits),
    width: widthSchema,
  })
  .meta({ id: 'NumberFormat' })

const limitSchema = z.number({ error: 'Give a number, or leave it empty.' }).nullable()

const kindShape = <Unit extends z.ZodType>(unit: Unit) => ({
  coordinateUnit: unit,
  energyUnit: energyUnitSchema,
  force: z.strictObject({ energyUnit: energyUnitSchema, per: unit }),
  rows: within(rows).nullable(),
  low: limitSchema,
  high: limitSchema,
})

/** More columns than there are quantities would repeat one. */
const MOST_COLUMNS = 8
const templateSchema = z.string().max(templateLength, `Keep the text within ${templateLength} characters.`)
const rowTemplateSchema = z
  .string()
  .max(rowTemplateLength, `Keep the row within ${rowTemplateLength} characters.`)

/** How a table is written (document version 1); described in docs/layouts.md. */
export const layoutDocumentSchema = z
  .strictObject({
    version: z.literal(1),
    writing: z.enum(['columns', 'template', 'json']),
    columns: z.array(z.enum(['row', 'coordinate', 'energy', 'force', 'derivative'])).max(MOST_COLUMNS),
    rowTemplate: rowTemplateSchema,
    firstRow: z.union([z.literal(0), z.literal(1)]),
    bond: z.strictObject(kindShape(lengthUnitSchema)),
    angle: z.strictObject({
      ...kindShape(angleUnitSchema),
      reading: z.enum(['internal', 'supplement']),
    }),
    dihedral: z.strictObject({
      ...kindShape(angleUnitSchema),
      zero: z.enum(['cis', 'trans']),
      range: z.enum(['-180..180', '0..360']),
      repeatEnd: z.boolean(),
    }),
    numbers: z.strictObject({
      row: z.strictObject({ width: widthSchema }),
      coordinate: numberFormatSchema,
      energy: numberFormatSchema,
      force: numberFormatSchema,
    }),
    separator: z.enum(['spaces', 'tab', 'comma', 'semicolon']),
    comment: z
      .string()
      .max(commentLength, `Keep the comment sign within ${commentLength} characters.`)
      .regex(/^\P{Cc}*$/u, 'The comment sign stands on one line.'),
    lineEnd: z.enum(['lf', 'crlf']),
    header: templateSchema,
    footer: templateSchema,
    joint: z.strictObject({
      columns: z
        .array(z.enum(['row', 'x', 'y', 'energy', 'xForce', 'yForce', 'xDerivative', 'yDerivative']))
        .max(MOST_COLUMNS),
      rowTemplate: rowTemplateSchema,
      outer: z.enum(['x', 'y']),
      blankLines: z.boolean(),
      header: templateSchema,
      footer: templateSchema,
    }),
  })
  .meta({ id: 'LayoutDocument' })
export type LayoutDocument = z.infer<typeof layoutDocumentSchema>

export const builtInKeySchema = z
  .enum(BUILT_IN_LAYOUTS.map(({ key }) => key))
  .meta({ id: 'BuiltInLayoutKey' })

/** One of the house by its key, or one of the group by its id. */
export const layoutRefSchema = z.union([builtInKeySchema, idSchema]).meta({ id: 'LayoutRef' })
export type LayoutRef = z.infer<typeof layoutRefSchema>

const versionSchema = z.number().int().positive()

/** A layout of the group without its document. */
export const layoutSummarySchema = z
  .object({
    id: idSchema,
    name: z.string(),
    /** The newest; each save makes one more. */
    version: versionSchema,
    /** Archived ones are not offered, but what was written with them can be written again. */
    archived: z.boolean(),
    savedAt: timestampSchema,
    savedBy: personSchema.nullable(),
  })
  .meta({ id: 'LayoutSummary' })
export type LayoutSummary = z.infer<typeof layoutSummarySchema>

/** GET /api/groups/:groupId/layouts. */
export const layoutListSchema = z
  .object({
    builtIns: z.array(z.object({ key: builtInKeySchema, name: z.string(), about: z.string() })),
    layouts: z.array(layoutSummarySchema),
    /** What the group takes where nobody chooses. */
    default: layoutRefSchema,
  })
  .meta({ id: 'LayoutList' })
export type LayoutList = z.infer<typeof layoutListSchema>

/** A layout in one of its versions. */
export const layoutSchema = layoutSummarySchema
  .extend({
    document: layoutDocumentSchema,
    /** Number of the newest version, when this is an older one. */
    newestVersion: versionSchema,
  })
  .meta({ id: 'Layout' })
export type StoredLayout = z.infer<typeof layoutSchema>

/** GET /api/layouts/:layoutId/versions, newest first. */
export const layoutVersionsSchema = z
  .object({
    versions: z.array(
      z.object({
        version: versionSchema,
        name: z.string(),
        savedAt: timestampSchema,
        savedBy: personSchema.nullable(),
      }),
    ),
  })
  .meta({ id: 'LayoutVersions' })
export type LayoutVersions = z.infer<typeof layoutVersionsSchema>

/** POST /api/groups/:groupId/layouts. */
export const layoutCreateSchema = z
  .object({ name: nameSchema, document: layoutDocumentSchema })
  .meta({ id: 'LayoutCreate' })
export type LayoutCreate = z.infer<typeof layoutCreateSchema>

/** PUT /api/layouts/:layoutId. 409 CONFLICT with the newest version in `details` when someone else saved in between. */
export const layoutSaveSchema = layoutCreateSchema
  .extend({ /** The version one started from. */ version: versionSchema })
  .meta({ id: 'LayoutSave' })
export type LayoutSave = z.infer<typeof layoutSaveSchema>

/** POST /api/layouts/:layoutId/copy. */
export const layoutCopySchema = z.object({ name: nameSchema }).meta({ id: 'LayoutCopy' })

/** PUT /api/groups/:groupId/default-layout. */
export const defaultLayoutSchema = z.object({ layout: layoutRefSchema }).meta({ id: 'DefaultLayout' })

/** GET /api/groups/:groupId/layout-examples: saved potentials that a layout can be tried on. */
export const layoutExamplesSchema = z
  .object({
    examples: z.array(
      z.object({
        termId: idSchema,
        statePointId: idSchema,
        kind: coordinateKindSchema,
        term: z.string(),
        mapping: z.string(),
        polymer: z.string(),
        /** K */
        temperature: z.number(),
      }),
    ),
  })
  .meta({ id: 'LayoutExamples' })
export type LayoutExample = z.infer<typeof layoutExamplesSchema>['examples'][number]

/** POST /api/terms/:termId/layout-preview. */
export const layoutPreviewAskSchema = z
  .object({ statePointId: idSchema, document: layoutDocumentSchema })
  .meta({ id: 'LayoutPreviewAsk' })
export type LayoutPreviewAsk = z.infer<typeof layoutPreviewAskSchema>

/** One thing that was looked at in the file a layout writes. */
export const layoutCheckSchema = z
  .object({ code: z.string(), ok: z.boolean(), message: z.string() })
  .meta({ id: 'LayoutCheck' })

/** The ends of the very file that a download gives, and what was found in it. */
export const layoutPreviewSchema = z
  .object({
    fileName: z.string(),
    kind: coordinateKindSchema,
    /** Lines of the whole file. */
    lines: z.number().int(),
    head: z.array(z.string()),
    /** Empty where the head holds all. */
    tail: z.array(z.string()),
    checks: z.array(layoutCheckSchema),
  })
  .meta({ id: 'LayoutPreview' })
export type LayoutPreview = z.infer<typeof layoutPreviewSchema>

/** Batch entry: a table of measurements, its mapping, its rows. */
import { z } from 'zod'
import { METHOD_KEYS } from '../methods.ts'
import { QUANTITY_KEYS } from '../quantities.ts'

const text = z.string().nullable()

/** What a column of the file can hold. `value:<quantity>` is a column of values of that quantity in a wide table. */
export const COLUMN_ROLES = [
  'ignore', 'galaxy', 'ra', 'dec', 'quantity', 'value', 'text', 'err', 'err_plus', 'err_minus', 'err_sys', 'unit', 'method', 'anchor', 'anchor_value_assumed', 'source', 'locator', 'note', 'class',
] as const

const wideRole = z.string().refine((s) => {
  const m = /^(value|err):(.+)$/.exec(s)
  return m !== null && (QUANTITY_KEYS as readonly string[]).includes(m[2] ?? '')
}, 'This is no role that a column can have.')

export const mappingSchema = z.strictObject({
  /** Role of each column of the file, in order. */
  columns: z.array(z.strictObject({ role: z.union([z.enum(COLUMN_ROLES), wideRole]), unit: z.string().max(24).default('') })).max(500),
  /** What holds for every row that does not say otherwise. */
  constants: z
    .strictObject({
      sourceId: z.int().positive().nullable().default(null),
      quantity: z.enum(QUANTITY_KEYS).nullable().default(null),
      unit: z.string().max(24).nullable().default(null),
      method: z.enum(METHOD_KEYS).nullable().default(null),
      anchor: z.string().max(60).nullable().default(null),
      anchorValueAssumed: z.number().nullable().default(null),
      convention: z.enum(['true', 'sfd']).nullable().default(null),
    })
    .prefault({}),
  /** Galaxies that the catalogue does not know and whose position the file gives are added. */
  addGalaxies: z.boolean().default(true),
})

export const importSchema = z.object({
  id: z.int(),
  fileName: z.string(),
  format: z.string(),
  headers: z.array(z.string()),
  /** A few rows as they stand in the file. */
  sample: z.array(z.array(z.string())),
  mapping: mappingSchema,
  rows: z.int(),
  rowsOk: z.int(),
  rowsBad: z.int(),
  rowsLeftOut: z.int(),
  newGalaxies: z.int(),
  newSources: z.int(),
  submission: z.int().nullable(),
  createdAt: z.string(),
})

export const importRowSchema = z.object({
  number: z.int(),
  raw: z.array(z.string()),
  /** In words: "NGC 300 (new), distance modulus 26.37 ± 0.05 mag, Cepheids, Gieren+2005 ApJ 628 695" */
  reading: text,
  galaxy: z.object({ slug: text, name: z.string(), isNew: z.boolean() }).nullable(),
  problems: z.array(z.object({ column: z.string().nullable(), message: z.string() })),
  leftOut: text,
})

/** GET /api/imports/:id/rows?only=bad|ok|all&offset=&limit= */
export const importRowsSchema = z.object({ rows: z.array(importRowSchema), total: z.int() })
/** PATCH /api/imports/:id */
export const importPatchSchema = z.strictObject({ mapping: mappingSchema })
/** PATCH /api/imports/:id/rows/:number: mend cells, or leave the row out with a reason (null: take it in again). */
export const importRowPatchSchema = z.strictObject({ cells: z.array(z.string().max(4000)).max(500).optional(), leftOut: z.string().trim().min(1).max(400).nullable().optional() })
/** POST /api/imports/:id/draft: good rows become changes of a new draft, or of a given one. Bad rows stay in the import for mending. */
export const importDraftSchema = z.strictObject({ title: z.string().trim().min(1, 'Give the draft a title.').max(160), summary: z.string().trim().max(8000).default('') })
export const importDraftAnswerSchema = z.object({ submission: z.int(), changes: z.int(), left: z.int() })
export const importListSchema = z.object({ imports: z.array(importSchema) })

export type Mapping = z.infer<typeof mappingSchema>
export type ImportAnswer = z.infer<typeof importSchema>
export type ImportRow = z.infer<typeof importRowSchema>

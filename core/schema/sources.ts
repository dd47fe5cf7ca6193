/** The literature. */
import { z } from 'zod'

const text = z.string().nullable()
export const SOURCE_KINDS = ['article', 'catalogue', 'thesis', 'private', 'demonstration'] as const

export const sourceInputSchema = z.strictObject({
  title: z.string().trim().min(1, 'Type the title.').max(400),
  /** "Gieren, W." each. */
  authors: z.array(z.string().trim().min(1).max(120)).min(1, 'Name at least one author.').max(3000),
  year: z.int('This must be a year.').min(1600).max(2200),
  venue: z.string().trim().max(200).default(''),
  kind: z.enum(SOURCE_KINDS).default('article'),
  bibcode: z
    .string()
    .trim()
    .regex(/^[12]\d{3}[A-Za-z][A-Za-z0-9.&]{4}[A-Za-z0-9.]{4}[A-Za-z0-9.][0-9.]{3}[0-9.][A-Z.:]$/, 'A bibcode has 19 characters, such as 2005ApJ...628..695G.')
    .nullable()
    .default(null),
  doi: z
    .string()
    .trim()
    .toLowerCase()
    .regex(/^10\.\d{4,9}\/\S+$/, 'A DOI begins with 10. and has a slash, such as 10.1086/430903.')
    .nullable()
    .default(null),
  url: z.url('This is not an address.').max(400).startsWith('http', 'Only http and https addresses.').nullable().default(null),
})

export const sourceSchema = z.object({
  id: z.int(),
  /** "Gieren et al. 2005" */
  label: z.string(),
  title: z.string(),
  authors: z.array(z.string()),
  year: z.int(),
  venue: z.string(),
  kind: z.enum(SOURCE_KINDS),
  bibcode: text,
  doi: text,
  url: text,
  measurements: z.int(),
  galaxies: z.int(),
})

/** GET /api/sources?q= */
export const sourceListSchema = z.object({ sources: z.array(sourceSchema) })
/** GET /api/sources/:id */
export const sourceDetailSchema = sourceSchema.extend({
  contributed: z.array(
    z.object({ measurementId: z.int(), slug: z.string(), galaxy: z.string(), quantity: z.string(), value: z.string(), method: text, used: z.boolean() }),
  ),
})

export type SourceInput = z.infer<typeof sourceInputSchema>
export type SourceForm = z.input<typeof sourceInputSchema>
export type Source = z.infer<typeof sourceSchema>
export type SourceDetail = z.infer<typeof sourceDetailSchema>

/** Releases: a label on a revision, exact for ever. */
import { z } from 'zod'

export const releaseInputSchema = z.strictObject({
  label: z.string().trim().regex(/^[0-9A-Za-z][0-9A-Za-z.-]{0,39}$/, 'A label has letters, digits, points and hyphens, such as 2026.2.'),
  title: z.string().trim().min(1, 'Give it a title.').max(160),
  notes: z.string().trim().max(20000).default(''),
})

export const releaseSchema = z.object({
  label: z.string(),
  revision: z.int(),
  title: z.string(),
  notes: z.string(),
  publishedBy: z.string().nullable(),
  publishedAt: z.string(),
  galaxies: z.int(),
  measurements: z.int(),
  /** An earlier release of the very same revision: nothing changed in between. */
  sameAs: z.string().nullable(),
})

export const releaseListSchema = z.object({ releases: z.array(releaseSchema), current: z.object({ revision: z.int(), unreleased: z.int() }).nullable() })

export type ReleaseInput = z.infer<typeof releaseInputSchema>
export type Release = z.infer<typeof releaseSchema>

/** What the routes of the scale answer. */
import { z } from 'zod'
import { METHOD_KEYS } from '../methods.ts'
import { ANCHOR_KINDS } from '../scale/anchor-fields.ts'
import { policySchema } from '../scale/policy.ts'

const text = z.string().nullable()

const anchorSchema = z.object({
  key: z.string(),
  label: z.string(),
  kind: z.enum(ANCHOR_KINDS),
  methods: z.array(z.enum(METHOD_KEYS)),
  /** mag */
  value: z.number(),
  /** mag */
  err: z.number(),
  source: z.string(),
  /** In force since this revision. */
  since: z.int(),
  /** Measurements that state which value of it they assumed. */
  measurements: z.int(),
  /** Measurements by its methods that state none: their scale is unknown. */
  unscaled: z.int(),
  /** Galaxies whose adopted distance uses a measurement that hangs on it. */
  galaxies: z.int(),
})

/** Of one method: how many distances are held, how many are used, of how many galaxies. */
const methodCountSchema = z.object({
  method: z.enum(METHOD_KEYS),
  measurements: z.int(),
  measurementsUsed: z.int(),
  galaxies: z.int(),
  galaxiesUsed: z.int(),
})

/** GET /api/scale */
export const scaleSchema = z.object({
  revision: z.int(),
  anchors: z.array(anchorSchema),
  /** Every method that the policy knows or that a measurement names. */
  methods: z.array(methodCountSchema),
  policy: policySchema,
  /** The policy is in force since this revision. */
  policySince: z.int(),
  /** Galaxies with an adopted distance. */
  galaxies: z.int(),
})

/** GET /api/scale/history: newest first. */
export const scaleHistorySchema = z.object({
  entries: z.array(
    z.object({
      revision: z.int(),
      at: z.string(),
      /** Who approved it; null for visitors. */
      by: text,
      summary: z.string(),
      submission: z.int().nullable(),
      changes: z.array(z.object({ subject: z.string(), field: z.string(), before: text, after: text })),
    }),
  ),
})

export type ScaleAnswer = z.infer<typeof scaleSchema>
export type ScaleAnchor = z.infer<typeof anchorSchema>
export type MethodCount = z.infer<typeof methodCountSchema>
export type ScaleHistory = z.infer<typeof scaleHistorySchema>

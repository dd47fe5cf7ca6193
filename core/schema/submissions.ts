/** Submissions, their changes, the effect of approving them, and decisions. */
import { z } from 'zod'
import { conflictSchema, problemSchema } from '../problem.ts'
import { CHANGE_ACTIONS } from './changes.ts'

const text = z.string().nullable()
const plain = z.union([z.string(), z.number(), z.boolean(), z.null()])

export const SUBMISSION_STATES = ['draft', 'submitted', 'returned', 'approved', 'rejected', 'withdrawn'] as const
export type SubmissionState = (typeof SUBMISSION_STATES)[number]

/** POST /api/submissions, PATCH /api/submissions/:id (with the lockVersion last seen). */
export const submissionInputSchema = z.strictObject({
  title: z.string().trim().min(1, 'Give it a title.').max(160),
  summary: z.string().trim().max(8000).default(''),
})
export const submissionPatchSchema = submissionInputSchema.partial().extend({ lockVersion: z.int() })

/** What an automatic check found of one change. */
export const checkSchema = z.object({
  check: z.string(),
  level: z.enum(['ok', 'warn', 'stop']),
  sentence: z.string(),
})

export const changeSchema = z.object({
  id: z.int(),
  position: z.int(),
  action: z.enum(CHANGE_ACTIONS),
  payload: z.unknown(),
  /** "Ostrel IX, distance modulus" */
  subject: z.string(),
  galaxy: z.object({ slug: z.string(), name: z.string() }).nullable(),
  /** Field by field: what holds now, what is proposed, in words with units. */
  diff: z.array(z.object({ field: z.string(), before: text, after: text })),
  /** Where the new value of a measurement stands: published, on the catalogue's scale, and what is adopted so far. */
  standing: z
    .object({ quantity: z.string(), unit: z.string(), published: text, scaled: text, adopted: text, source: z.string(), method: text, anchor: text })
    .nullable(),
  checks: z.array(checkSchema),
  conflicts: z.array(conflictSchema),
})

export const submissionSummarySchema = z.object({
  id: z.int(),
  title: z.string(),
  state: z.enum(SUBMISSION_STATES),
  author: z.object({ id: z.int(), name: z.string() }),
  changes: z.int(),
  /** The kinds of them, each once. */
  actions: z.array(z.enum(CHANGE_ACTIONS)),
  /** Checks that warn or stop. */
  cautions: z.int(),
  conflicts: z.int(),
  createdAt: z.string(),
  updatedAt: z.string(),
  submittedAt: text,
  decidedAt: text,
  decidedBy: text,
  revision: z.int().nullable(),
})

export const submissionSchema = submissionSummarySchema.extend({
  summary: z.string(),
  lockVersion: z.int(),
  baseRevision: z.int(),
  /** Of the version now under review; a decision must name it. null in a draft never submitted. */
  contentHash: text,
  version: z.int(),
  decisionNote: text,
  items: z.array(changeSchema),
  /** Newest first: submitted, returned, approved ... by whom and when. */
  timeline: z.array(z.object({ at: z.string(), by: text, what: z.string(), note: text })),
  remarks: z.array(z.object({ id: z.int(), change: z.int().nullable(), author: z.string(), at: z.string(), body: z.string() })),
  /** Other open submissions that touch the same things. */
  overlaps: z.array(z.object({ submission: z.int(), title: z.string(), subject: z.string() })),
  /** What this reader may do now. */
  may: z.object({ edit: z.boolean(), submit: z.boolean(), withdraw: z.boolean(), review: z.boolean(), remove: z.boolean() }),
  /** Why not, where a person would expect to: "You may not review your own submission." */
  mayNot: text,
})

/** GET /api/submissions/:id/effect */
export const effectSchema = z.object({
  /** The catalogue the effect was computed on. */
  revision: z.int(),
  contentHash: z.string(),
  /** Adopted and derived values that would differ, by galaxy: those that change most first, at most EFFECT_MOST_GALAXIES (core/effect.ts). */
  galaxies: z.array(
    z.object({
      slug: z.string(),
      name: z.string(),
      kind: z.enum(['added', 'changed']),
      changes: z.array(z.object({ column: z.string(), label: z.string(), unit: z.string(), before: plain, after: plain })),
    }),
  ),
  /** Systems that gain or lose members. */
  systems: z.array(z.object({ slug: z.string(), name: z.string(), before: z.int(), after: z.int(), gained: z.array(z.string()), lost: z.array(z.string()) })),
  /** Galaxies whose adopted distance modulus moves (mag), the farthest first, at most EFFECT_MOST_SHIFTS: for a plot of the whole catalogue moving. */
  shifts: z.array(
    z.object({
      slug: z.string(),
      name: z.string(),
      /** Mpc, before. */
      distance: z.number(),
      before: z.number(),
      after: z.number(),
      /** Of the modulus before, statistical and systematic, mag. */
      error: z.number(),
      method: text,
      hostChanged: z.boolean(),
    }),
  ),
  /** Of the whole effect, whatever is listed. */
  counts: z.object({ galaxiesAdded: z.int(), galaxiesChanged: z.int(), distancesMoved: z.int(), hostsChanged: z.int(), measurements: z.int() }),
})

/** GET /api/submissions/:id/effect/progress, one a line: how far the computation is, then the effect or what went wrong. */
export const effectLineSchema = z.union([
  z.object({ progress: z.number().min(0).max(1), step: z.string() }),
  z.object({ effect: effectSchema }),
  z.object({ problem: problemSchema }),
])

/** POST .../return, .../reject: the note is obligatory; .../approve: it is not. */
export const decisionSchema = z.strictObject({ contentHash: z.string().min(8), note: z.string().trim().max(8000).default('') })
export const refusalSchema = decisionSchema.extend({ note: z.string().trim().min(3, 'Say why, so that the author can mend it.').max(8000) })
/** POST .../submit, .../withdraw */
export const transitionSchema = z.strictObject({ lockVersion: z.int() })
export const remarkInputSchema = z.strictObject({ change: z.int().nullable().default(null), body: z.string().trim().min(1, 'Type the remark.').max(8000) })

/** GET /api/submissions?state=&mine=&review= */
export const submissionListSchema = z.object({ submissions: z.array(submissionSummarySchema) })

export type Check = z.infer<typeof checkSchema>
export type ChangeAnswer = z.infer<typeof changeSchema>
export type SubmissionSummary = z.infer<typeof submissionSummarySchema>
export type SubmissionAnswer = z.infer<typeof submissionSchema>
export type Effect = z.infer<typeof effectSchema>

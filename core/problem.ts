/** Problem details (RFC 9457), the one shape in which the server says that something went wrong. */
import { z } from 'zod'

export const problemSchema = z.object({
  /** Names the kind of problem, for programs: `about:blank` or `urn:vicinage:problem:<kind>`. */
  type: z.string(),
  title: z.string(),
  status: z.int(),
  /** What happened, what is safe, what to do. */
  detail: z.string(),
  /** The request, for the log. */
  instance: z.string().optional(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  /** For a conflict (409): what differs, field by field. */
  conflicts: z.array(z.lazy(() => conflictSchema)).optional(),
})

const plain = z.union([z.string(), z.number(), z.boolean(), z.null()])

/** One field that moved under somebody's feet. */
export const conflictSchema = z.object({
  change: z.int(),
  /** "Ostrel IX, distance modulus" */
  subject: z.string(),
  field: z.string(),
  base: plain,
  theirs: plain,
  yours: plain,
  /** Who moved it, and in which revision. */
  by: z.string().nullable(),
  revision: z.int().nullable(),
})

export type Problem = z.infer<typeof problemSchema>
export type Conflict = z.infer<typeof conflictSchema>

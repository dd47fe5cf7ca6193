/** Who did what, for the steward. */
import { z } from 'zod'

export const auditEntrySchema = z.object({
  id: z.int(),
  at: z.string(),
  /** null for somebody unknown, such as a refused sign-in. */
  actor: z.string().nullable(),
  /** "submission.approve", "session.refuse" ... */
  action: z.string(),
  /** "submission:12", "user:3" ... */
  subject: z.string(),
  details: z.record(z.string(), z.unknown()),
})

/** GET /api/audit: newest first. */
export const auditListSchema = z.object({
  entries: z.array(auditEntrySchema),
  /** Goes into `before` for the next page; null on the last. */
  next: z.int().nullable(),
})

export type AuditEntry = z.infer<typeof auditEntrySchema>

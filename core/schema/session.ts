/** Signing in and who one is. */
import { z } from 'zod'
import { ROLES } from '../permissions.ts'

export const signInSchema = z.strictObject({
  email: z.email('This is not an e-mail address.').max(254),
  password: z.string().min(1, 'Type the password.').max(1024),
})

export const sessionSchema = z.object({
  user: z.object({ id: z.int(), name: z.string(), email: z.string(), roles: z.array(z.enum(ROLES)) }).nullable(),
  permissions: z.array(z.string()),
  /** Goes into the X-CSRF-Token header of every write. */
  csrfToken: z.string(),
  catalogue: z.object({
    kind: z.enum(['demonstration', 'published', 'empty']),
    /** The current revision. */
    revision: z.int(),
    /** The newest release, which visitors read; null before the first. */
    release: z.string().nullable(),
  }),
})

export type SignIn = z.infer<typeof signInSchema>
export type Session = z.infer<typeof sessionSchema>

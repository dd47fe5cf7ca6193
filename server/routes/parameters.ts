/** Parameters that many addresses have. */
import { z } from 'zod'

/** The largest integer that an id can be in the database. */
const LARGEST_ID = 2_147_483_647

export const idNumber = z.coerce.number().int().positive().max(LARGEST_ID)

/** `/:id` */
export const one = z.object({ id: idNumber })

/** `?at=`: a release label, or a revision number. */
export const atQuery = z.strictObject({
  at: z.string().regex(/^[0-9A-Za-z][0-9A-Za-z.-]{0,39}$/, 'Give a revision number or the label of a release.').optional(),
})

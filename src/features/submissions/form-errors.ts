import type { z } from 'zod'
import { fieldError } from '../../api/client.ts'

/**
 * The message for one field, from our own reading of the form or, after sending, from the server's.
 *
 * @param path - as the schema names it, such as `measurement.value`
 */
export function errorAt(issues: readonly z.core.$ZodIssue[], sent: unknown, ...paths: string[]): string | undefined {
  for (const path of paths) {
    const own = issues.find((issue) => issue.path.join('.') === path)?.message
    const theirs = own ?? fieldError(sent, path) ?? fieldError(sent, `payload.${path}`)
    if (theirs) return theirs
  }
  return undefined
}

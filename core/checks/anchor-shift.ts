import type { Check, ProposedAnchor } from './check.ts'

/** An anchor that moves by more than its error leaves: either the old error was too small, or the new value is wrong. */
export function anchorShift({ before, after }: ProposedAnchor): Check | null {
  if (after.err === 0) return { check: 'anchor-shift', level: 'warn', sentence: `${after.label} would have no error: all that hangs on it would look surer than anybody is.` }
  if (before === null) return { check: 'anchor-shift', level: 'ok', sentence: `${after.label} is new: values that state it can be put on our scale from now on.` }
  const shift = after.value - before.value
  const error = Math.max(before.err, after.err)
  const words = `${shift >= 0 ? '+' : '\u2212'}${Math.abs(shift).toFixed(3)} mag`
  if (shift === 0) return null
  if (Math.abs(shift) <= 3 * error) return { check: 'anchor-shift', level: 'ok', sentence: `${after.label} moves by ${words}, ${(Math.abs(shift) / error).toFixed(1)} times its error.` }
  return { check: 'anchor-shift', level: 'warn', sentence: `${after.label} moves by ${words}, ${(Math.abs(shift) / error).toFixed(1)} times its error: say in the reason why the old value was that wrong.` }
}

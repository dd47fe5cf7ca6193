/** What setting an anchor to another value does to the distances that hang on it, before anything is computed. */
import type { Anchor } from '../catalogue/types.ts'
import { numberWords } from '../formats/measure-words.ts'
import { METHODS } from '../methods.ts'
import { GAP } from '../spaces.ts'

/**
 * How far the moduli move that state which value they assumed, mag: with the anchor's modulus, and against a candle's absolute magnitude,
 * since μ = m − M.
 */
export function modulusShift(kind: Anchor['kind'], before: number, after: number): number {
  return kind === 'modulus' ? after - before : before - after
}

/** The factor on a distance, from D = 10^((μ − 25) / 5) Mpc. @param shift - of the modulus, mag */
export function distanceFactor(shift: number): number {
  return 10 ** (shift / 5)
}

/** "+0.05 mag: distances by Cepheids and Miras shrink by 2.3 %"; null when the value stays. */
export function anchorShiftSentence(anchor: Pick<Anchor, 'kind' | 'methods'>, before: number, after: number): string | null {
  const difference = Number((after - before).toFixed(6))
  if (difference === 0) return null
  const change = (distanceFactor(modulusShift(anchor.kind, before, after)) - 1) * 100
  const percent = Math.abs(change) < 0.05 ? `less than 0.1${GAP}%` : `${Math.abs(change).toFixed(1)}${GAP}%`
  return `${difference > 0 ? '+' : ''}${numberWords(difference, 2)}${GAP}mag: distances by ${methodList(anchor.methods)} ${change > 0 ? 'grow' : 'shrink'} by ${percent}`
}

function methodList(keys: readonly string[]): string {
  const labels = METHODS.filter((m) => keys.includes(m.key)).map((m) => m.label)
  if (labels.length === 0) return 'no method'
  return labels.length === 1 ? (labels[0] ?? '') : `${labels.slice(0, -1).join(', ')} and ${labels.at(-1) ?? ''}`
}

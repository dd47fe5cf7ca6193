/** Adoption explained in a sentence. */
import { method } from '../methods.ts'
import type { Chosen, Scale } from './adopted.ts'
import type { DistanceCandidate } from './adopt-distance.ts'

/**
 * "Weighted from 3 TRGB and 2 Cepheid values on the catalogue's scale. 2 Tully–Fisher values of a lower tier are shown and not used. 1 value
 * is excluded: blended. No tension: largest residual 1.1 σ."
 */
export function distanceSentence(candidates: readonly DistanceCandidate[], weights: ReadonlyMap<DistanceCandidate, number>, override: Chosen | null, scale: Scale): string {
  const used = candidates.filter((c) => (weights.get(c) ?? 0) > 0)
  const lower = candidates.filter((c) => c.barred === null && !used.includes(c))
  const out = candidates.filter((c) => c.barred !== null)
  const sentences = [first(used, override)]
  if (lower.length > 0) sentences.push(`${byMethod(lower)} of a lower tier ${lower.length === 1 ? 'is' : 'are'} shown and not used.`)
  if (!override) for (const [reason, n] of tally(out.map((c) => c.barred ?? ''))) sentences.push(leftOut(reason, n))
  const assumed = used.filter((c) => c.flags.includes('error assumed')).length
  if (assumed > 0) sentences.push(`${counted(assumed, 'value')} without a stated error ${assumed === 1 ? 'takes' : 'take'} the policy’s.`)
  const unscaled = used.filter((c) => c.flags.includes('scale unknown')).length
  if (unscaled > 0) sentences.push(`${counted(unscaled, 'value')} ${unscaled === 1 ? 'does not say on which scale, and is' : 'do not say on which scale, and are'} taken as published.`)
  sentences.push(...tension(used, weights, scale))
  return sentences.join(' ')
}

function first(used: readonly DistanceCandidate[], override: Chosen | null): string {
  if (override) return `Set by an override from ${byMethod(used)}: ${override.reason}.`
  const only = used[0]
  if (used.length === 1 && only) {
    const onScale = only.measurement.anchorValueAssumed !== null && !only.flags.includes('scale unknown')
    return `From one ${method(only.rule.method).inWords} value${onScale ? ' on the catalogue’s scale' : ''}.`
  }
  return `Weighted from ${byMethod(used)} on the catalogue’s scale.`
}

/** "1 value is excluded: blended.", "2 upper limits are shown and not used." */
function leftOut(reason: string, n: number): string {
  const be = n === 1 ? 'is' : 'are'
  return reason.endsWith(' limit') ? `${counted(n, reason)} ${be} shown and not used.` : `${counted(n, 'value')} ${be} ${reason}.`
}

function tension(used: readonly DistanceCandidate[], weights: ReadonlyMap<DistanceCandidate, number>, scale: Scale): string[] {
  if (used.length < 2) return []
  const mean = used.reduce((sum, c) => sum + c.scaled * (weights.get(c) ?? 0), 0)
  const largest = Math.max(...used.map((c) => Math.abs(c.scaled - mean) / c.error))
  const words = `${largest.toFixed(1)} σ`
  return [largest > scale.policy.tension ? `In tension: largest residual ${words}.` : `No tension: largest residual ${words}.`]
}

/** "3 TRGB and 2 Cepheid values" */
function byMethod(list: readonly DistanceCandidate[]): string {
  const parts = [...tally(list.map((c) => method(c.rule.method).inWords))].map(([words, n]) => `${n} ${words}`)
  const joined = parts.length > 1 ? `${parts.slice(0, -1).join(', ')} and ${parts.at(-1) ?? ''}` : (parts[0] ?? '0')
  return `${joined} ${list.length === 1 ? 'value' : 'values'}`
}

function tally(words: readonly string[]): Map<string, number> {
  const counts = new Map<string, number>()
  for (const word of words) counts.set(word, (counts.get(word) ?? 0) + 1)
  return counts
}

function counted(n: number, one: string): string {
  return `${n} ${one}${n === 1 ? '' : 's'}`
}

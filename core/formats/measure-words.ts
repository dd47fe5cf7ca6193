/** Measurements in words, as tables and notices print them: `27.78 ± 0.05 mag`, `3.61 +0.09 −0.08 Mpc`. */
import { quantity } from '../quantities.ts'
import type { QuantityKey } from '../quantities.ts'
import { GAP } from '../spaces.ts'

const MINUS = '\u2212'

export interface MeasureToPrint {
  value: number | null
  errPlus?: number | null
  errMinus?: number | null
  errSys?: number | null
  textValue?: string | null
  limitFlag?: 'upper' | 'lower' | null
  unit: string
}

/** A number with a true minus, and no more decimals than are needed to tell it from others; `decimals` is the least. */
export function numberWords(value: number, decimals: number): string {
  const shortest = String(Number(Math.abs(value).toPrecision(12)))
  const own = /^\d+\.(\d+)$/.exec(shortest)?.[1]?.length ?? 0
  const text = shortest.includes('e') ? shortest.replace('-', MINUS) : Math.abs(value).toFixed(Math.min(12, Math.max(own, decimals)))
  return value < 0 && Number(text) !== 0 ? MINUS + text : text
}

/**
 * A number with its error bars and unit. Values are rounded to `decimals` where given, else printed as exactly as they are held.
 */
export function measureWords(m: MeasureToPrint, decimals?: number): string {
  if (m.textValue != null) return m.textValue
  if (m.value === null) return '—'
  const print = (x: number): string => {
    if (decimals === undefined) return numberWords(x, 0)
    const text = Math.abs(x).toFixed(decimals)
    return x < 0 && Number(text) !== 0 ? MINUS + text : text
  }
  const parts = [`${m.limitFlag === 'upper' ? `<${GAP}` : m.limitFlag === 'lower' ? `>${GAP}` : ''}${print(m.value)}`]
  const up = m.errPlus ?? null
  const down = m.errMinus ?? null
  if (up !== null && down !== null && print(up) === print(down)) parts.push(`±${GAP}${print(up)}`)
  else {
    if (up !== null) parts.push(`+${print(up)}`)
    if (down !== null) parts.push(`${MINUS}${print(down)}`)
  }
  if (m.errSys != null) parts.push(`±${GAP}${print(m.errSys)}${GAP}(sys)`)
  if (m.unit !== '') parts.push(m.unit)
  return parts.join(GAP)
}

/** A measurement held in the canonical unit of its quantity, rounded as that quantity prints. */
export function canonicalWords(key: QuantityKey, m: Omit<MeasureToPrint, 'unit'>): string {
  const q = quantity(key)
  return measureWords({ ...m, unit: q.unit }, q.decimals)
}

/** A quantity's label in the middle of a sentence: "distance modulus", but "Hubble stage T", "B magnitude", "H I flux". */
export function labelInSentence(label: string): string {
  return /^[A-Z][a-z]/.test(label) && !label.startsWith('Hubble') ? label.charAt(0).toLowerCase() + label.slice(1) : label
}

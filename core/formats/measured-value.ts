/** Reads a value with its error bars as papers and tables write it. */

export interface MeasuredValue {
  kind: 'value'
  value: number
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  limitFlag: 'upper' | 'lower' | null
  /** As written after the number; empty when none is. */
  unit: string
}

export type ReadValue = MeasuredValue | { kind: 'missing' } | { kind: 'unreadable'; why: string }

const MISSING = new Set(['', '-', '--', '---', '.', '..', '...', '…', 'nan', 'null', 'none', 'n/a', 'na', 'undefined', '?'])
const UNSIGNED = String.raw`\d+(?:\.\d*)?(?:e[+-]?\d+)?|\.\d+(?:e[+-]?\d+)?`

const NUMBER = new RegExp(`^([+-]?(?:${UNSIGNED}))\\s*`, 'i')
const IN_BRACKETS = new RegExp(String.raw`^\((${UNSIGNED})\)\s*`, 'i')
const BOTH_WAYS = new RegExp(String.raw`^±\s*(${UNSIGNED})\s*(?:\(?\s*(stat|rand|random|statistical|sys|syst|systematic)\.?\s*\)?)?\s*`, 'i')
const UPWARDS = new RegExp(String.raw`^\+\s*(${UNSIGNED})\s*[,/]?\s*`, 'i')
const DOWNWARDS = new RegExp(String.raw`^-\s*(${UNSIGNED})\s*[,/]?\s*`, 'i')
/** Most cells of a table are a bare number. */
const BARE = /^-?\d{1,15}(\.\d{1,15})?$/

/** Whether a cell says that there is no value: a blank, a dash, "nan" ... */
export function isMissingValue(text: string): boolean {
  return text.length < 16 && MISSING.has(normalised(text).toLowerCase())
}

/**
 * `27.78 ± 0.05`, `27.78 +0.06 -0.04`, `3.60(5) Mpc`, `27.78+/-0.05 mag`, `18.477 ± 0.004 ± 0.026` (the second error is the systematic one),
 * `< 1.2`, with any minus sign, with or without a unit. Blanks, dashes and words such as "nan" are a missing value.
 */
export function readMeasuredValue(text: string): ReadValue {
  if (BARE.test(text)) return { kind: 'value', value: Number(text), errPlus: null, errMinus: null, errSys: null, limitFlag: null, unit: '' }
  const plain = normalised(text)
  if (MISSING.has(plain.toLowerCase())) return { kind: 'missing' }
  const limit = /^(<=?|>=?|~)\s*/.exec(plain)
  if (limit?.[1] === '~') return unreadable(text, 'an approximate value has no error bar: state the value, and its error apart')
  let rest = plain.slice(limit?.[0].length ?? 0)
  const take = (pattern: RegExp): RegExpExecArray | null => {
    const found = pattern.exec(rest)
    if (found) rest = rest.slice(found[0].length)
    return found
  }

  const number = take(NUMBER)
  const written = number?.[1]
  if (written === undefined) return unreadable(text, 'it does not begin with a number')
  if (/^,\d/.test(rest)) return unreadable(text, 'write the decimal point as a point, and no separators of thousands')
  const value = Number(written)

  let errPlus: number | null = null
  let errMinus: number | null = null
  let errSys: number | null = null
  const inBrackets = take(IN_BRACKETS)
  if (inBrackets?.[1] !== undefined) errPlus = errMinus = errorOfLastDigits(written, inBrackets[1])
  for (;;) {
    const both = take(BOTH_WAYS)
    if (both?.[1] !== undefined) {
      const systematic = /^sys/i.test(both[2] ?? '') || errPlus !== null
      if (systematic && errSys !== null) return unreadable(text, 'it has more error bars than a statistical and a systematic one')
      if (systematic) errSys = Number(both[1])
      else errPlus = errMinus = Number(both[1])
      continue
    }
    const up = errPlus === null ? take(UPWARDS) : null
    if (up?.[1] !== undefined) {
      errPlus = Number(up[1])
      continue
    }
    const down = errMinus === null ? take(DOWNWARDS) : null
    if (down?.[1] !== undefined) {
      errMinus = Number(down[1])
      continue
    }
    break
  }
  if (!Number.isFinite(value)) return unreadable(text, 'the number is too large')
  if (rest !== '' && !/^[\p{L}°'"′″%☉⊙µ_[(]/u.test(rest)) return unreadable(text, `"${rest}" after the number means nothing here`)
  const unit = rest.replace(/^[[(](.*)[\])]$/, '$1').trim()
  return { kind: 'value', value, errPlus, errMinus, errSys, limitFlag: limit ? (limit[1]?.startsWith('<') ? 'upper' : 'lower') : null, unit }
}

/** An error in brackets counts in units of the last digit, 3.60(5) is 3.60 ± 0.05, unless it has a decimal point of its own. */
function errorOfLastDigits(written: string, error: string): number {
  if (error.includes('.')) return Number(error)
  const [mantissa = '', exponent = '0'] = written.toLowerCase().split('e')
  const decimals = mantissa.split('.')[1]?.length ?? 0
  return Number(`${error}e${Number(exponent) - decimals}`)
}

function normalised(text: string): string {
  return text
    .replace(/[\u2212\u2010-\u2013\uFE63\uFF0D]/g, '-')
    .replace(/[\s\u00A0\u2000-\u200B\u202F\u205F\u3000\uFEFF]+/g, ' ')
    .replace(/\\pm|\+\s*\/\s*-|\+-/g, '±')
    .replace(/\$/g, '')
    .replace(/≤/g, '<=')
    .replace(/≥/g, '>=')
    .trim()
}

function unreadable(text: string, why: string): ReadValue {
  const shown = text.trim().length > 60 ? `${text.trim().slice(0, 57)}...` : text.trim()
  return { kind: 'unreadable', why: `"${shown}" cannot be read as a value: ${why}.` }
}

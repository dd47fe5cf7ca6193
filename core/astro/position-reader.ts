/** Positions as people type them: sexagesimal or decimal, with or without letters and signs, or a designation that holds one. */
import type { Degrees } from './units.ts'

export type PositionReading =
  | { ok: true; ra: Degrees; dec: Degrees; form: 'sexagesimal' | 'degrees' | 'designation' }
  | { ok: false; error: string }

const bad = (error: string): PositionReading => ({ ok: false, error })

/**
 * Reads a position, ICRS.
 *
 * `00 42 44.3 +41 16 09`, `00:42:44.3, +41:16:09`, `0h42m44.3s +41d16m09s` are hours and degrees; `10.6847 41.2688` are degrees;
 * `J004244.3+411609` is a designation. A true minus is a minus.
 *
 * @returns the position, or a sentence that names the part that is wrong
 */
export function readPosition(text: string): PositionReading {
  const plain = text
    .normalize('NFKC')
    .replace(/[\u2212\u2013]/g, '-')
    .trim()
  if (plain === '') return bad('Type a position.')
  const designation = /^(?:.*\s)?J\s?(\d{2})(\d{2})(\d{2}(?:\.\d+)?)?\s?([+-])\s?(\d{2})(\d{2})(\d{2}(?:\.\d+)?)?$/i.exec(plain)
  if (designation) {
    const [, h, m, s, sign, d, dm, ds] = designation
    return sexagesimal([h, m, s ?? '0'], sign === '-', [d, dm, ds ?? '0'], 'designation')
  }
  const marked = /[hmsd°'"′″:ʰᵐˢ]/i.test(plain)
  const cleaned = plain.replace(/[hmsd°'"′″:,;ʰᵐˢ]+/gi, ' ').replace(/([+-])\s+(?=\d)/g, '$1').replace(/(\d)([+-])/g, '$1 $2').trim()
  const words = cleaned.split(/\s+/)
  const wrong = words.find((w) => !/^[+-]?\d+(\.\d*)?$/.test(w))
  if (wrong !== undefined) return bad(`"${wrong}" is no number. A position is typed as 00 42 44.3 +41 16 09, or as 10.6847 41.2688 in degrees.`)
  if (words.length === 2) return marked && /h/i.test(plain) ? bad('Right ascension in hours needs minutes: 00h 42m.') : decimal(words[0] ?? '', words[1] ?? '')
  if (words.length === 4 || words.length === 6) {
    const half = words.length / 2
    const first = words[half] ?? ''
    const right = words.slice(0, half)
    const left = [first.replace(/^[+-]/, ''), ...words.slice(half + 1)]
    if ([...right, ...left].some((w) => /^[+-]/.test(w))) return bad('Only the declination has a sign, before its degrees.')
    return sexagesimal(right, first.startsWith('-'), left, 'sexagesimal')
  }
  return bad(`A position has two numbers (degrees) or six (hours, minutes, seconds, degrees, minutes, seconds), not ${words.length}.`)
}

function decimal(raText: string, decText: string): PositionReading {
  const ra = Number(raText)
  const dec = Number(decText)
  if (ra < 0 || ra > 360) return bad(`Right ascension runs from 0 to 360 degrees; you typed ${raText}.`)
  if (dec < -90 || dec > 90) return bad(`Declination runs from −90 to +90 degrees; you typed ${decText}.`)
  return { ok: true, ra: ra === 360 ? 0 : ra, dec, form: 'degrees' }
}

function sexagesimal(right: readonly (string | undefined)[], south: boolean, left: readonly (string | undefined)[], form: 'sexagesimal' | 'designation'): PositionReading {
  const [h = 0, m = 0, s = 0] = right.map(Number)
  const [d = 0, dm = 0, ds = 0] = left.map(Number)
  if (h >= 24) return bad(`Hours of right ascension run from 0 to 23; you typed ${h}.`)
  for (const [value, what] of [[m, 'Minutes of right ascension'], [s, 'Seconds of right ascension'], [dm, 'Minutes of declination'], [ds, 'Seconds of declination']] as const) {
    if (value >= 60) return bad(`${what} run from 0 to 59; you typed ${value}.`)
  }
  const size = d + dm / 60 + ds / 3600
  if (size > 90) return bad(`Declination runs from −90 to +90 degrees; you typed ${south ? '−' : '+'}${d} ${dm} ${ds}.`)
  return { ok: true, ra: 15 * (h + m / 60 + s / 3600), dec: south ? -size : size, form }
}

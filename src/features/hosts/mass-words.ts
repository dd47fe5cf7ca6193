import { GAP } from '../../../core/spaces.ts'
import { MISSING } from '../../lib/format.ts'

const RAISED: Readonly<Record<string, string>> = { '0': '⁰', '1': '¹', '2': '²', '3': '³', '4': '⁴', '5': '⁵', '6': '⁶', '7': '⁷', '8': '⁸', '9': '⁹', '-': '⁻' }

/** A mass in Msun: "1.1 × 10¹² M☉". */
export function massWords(mass: number | null): string {
  if (mass === null || !(mass > 0)) return MISSING
  const [figures = '', power = ''] = mass.toExponential(1).split('e')
  return `${figures}${GAP}×${GAP}10${[...power.replace('+', '')].map((digit) => RAISED[digit] ?? digit).join('')}${GAP}M☉`
}

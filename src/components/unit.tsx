import { unitText } from '../lib/format.ts'

const SUPERSCRIPTS: Record<string, string> = { '⁻': '\u2212', '¹': '1', '²': '2', '³': '3' }

/** A unit with its exponents raised: `km/s` is km s⁻¹. */
export function Unit({ unit }: { unit: string }) {
  return unitText(unit)
    .split(/([⁻¹²³]+)/)
    .map((part, index) => (index % 2 === 1 ? <sup key={index}>{[...part].map((sign) => SUPERSCRIPTS[sign] ?? sign).join('')}</sup> : part))
}

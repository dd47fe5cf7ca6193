import { classLabel } from '../../../core/classes.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { GAP } from '../../../core/spaces.ts'
import { formatMeasure, formatNumber, formatSigned, unitText } from '../../lib/format.ts'

type Member = HostAnswer['members'][number]

/** A satellite in one line, for pictures: "Ostrel IX, dwarf spheroidal: r 112 kpc (96–130), Δv +43 km s⁻¹, M_V −9.1, membership 0.97". */
export function memberWords(member: Member): string {
  const separation = member.separationMedian ?? member.separation
  const parts = [
    separation === null ? null : `r${GAP}${formatNumber(separation, 0)}${GAP}kpc${rangeWords(member.separationLo, member.separationHi, 0)}`,
    member.dv === null ? null : `Δv${GAP}${formatSigned(member.dv, 0)}${member.dvErr === null ? '' : `${GAP}±${GAP}${formatNumber(member.dvErr, 0)}`}${GAP}${unitText('km/s')}`,
    member.absV === null ? null : `M_V${GAP}${formatMeasure({ value: member.absV, plus: member.absVErr, decimals: 1 })}`,
    member.probability === null ? null : `membership${GAP}${formatNumber(member.probability, 2)}`,
  ].filter((part) => part !== null)
  return `${member.name}, ${classLabel(member.class)}${parts.length > 0 ? `: ${parts.join(', ')}` : ''}`
}

/** " (96–130)"; nothing where a bound is unknown. */
export function rangeWords(lo: number | null, hi: number | null, decimals: number): string {
  return lo === null || hi === null ? '' : ` (${formatNumber(lo, decimals)}–${formatNumber(hi, decimals)})`
}

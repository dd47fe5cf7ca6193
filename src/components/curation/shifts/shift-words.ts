/** How shifts of moduli are written. */
import { METHODS } from '../../../../core/methods.ts'
import type { Effect } from '../../../../core/schema/submissions.ts'
import { shiftInErrors, shiftOf, summaryOf } from '../../../../core/shifts.ts'
import { GAP } from '../../../../core/spaces.ts'
import { formatCount, formatCounted, formatNumber, formatSigned } from '../../../lib/format.ts'

export type ShiftRow = Effect['shifts'][number]

/** In magnitudes, or in units of the error that the modulus has. */
export type ShiftScale = 'mag' | 'errors'

export function shiftOn(scale: ShiftScale, shift: ShiftRow): number | null {
  return scale === 'mag' ? shiftOf(shift) : shiftInErrors(shift)
}

export function methodLabel(key: string | null): string {
  return METHODS.find((m) => m.key === key)?.label ?? 'no method'
}

/** "214 of 600 galaxies move, by −0.050 to +0.031 mag, median −0.042; 3 change host." @param galaxies - with a distance, where that is known */
export function shiftsSentence(effect: Pick<Effect, 'shifts' | 'counts'>, galaxies?: number): string {
  const summary = summaryOf(effect.shifts)
  if (!summary) return 'No distance moves.'
  const { distancesMoved, hostsChanged } = effect.counts
  const who = galaxies === undefined ? formatCounted(distancesMoved, 'galaxy moves', 'galaxies move') : `${formatCount(distancesMoved)} of ${formatCounted(galaxies, 'galaxy', 'galaxies')} ${distancesMoved === 1 ? 'moves' : 'move'}`
  const least = formatSigned(summary.least, 3)
  const greatest = formatSigned(summary.greatest, 3)
  const by = least === greatest ? `by ${least}${GAP}mag` : `by ${least} to ${greatest}${GAP}mag, median ${formatSigned(summary.median, 3)}`
  const hosts = hostsChanged === 0 ? 'none changes host' : `${formatCount(hostsChanged)} ${hostsChanged === 1 ? 'changes' : 'change'} host`
  return `${who}, ${by}; ${hosts}.`
}

/** "Ostrel IX: 3.61 Mpc, −0.050 mag, changes host" */
export function shiftSentence(shift: ShiftRow): string {
  const inErrors = shiftInErrors(shift)
  return [
    `${shift.name}: ${formatNumber(shift.distance, 2)}${GAP}Mpc, ${formatSigned(shiftOf(shift), 3)}${GAP}mag${inErrors === null ? '' : ` (${formatSigned(inErrors, 2)}${GAP}σ)`}`,
    methodLabel(shift.method),
    shift.hostChanged && 'changes host',
  ].filter(Boolean).join(', ')
}

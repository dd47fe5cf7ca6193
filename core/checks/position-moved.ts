import { angleBetween, unitVector } from '../astro/sphere.ts'
import { degrees } from '../astro/units.ts'
import type { Check, ProposedAmendment } from './check.ts'

/** A correction of a centre is smaller than this, or than the galaxy itself, arcmin: common practice, no source. */
const CORRECTION_ARCMIN = 1

/** The new position is so far from the old one that it may be another galaxy's. */
export function positionMoved({ galaxy, position, moved, halfLightArcmin }: ProposedAmendment): Check | null {
  const arcmin = 60 * degrees(angleBetween(unitVector(position.ra, position.dec), unitVector(moved.ra, moved.dec)))
  if (arcmin === 0) return null
  const words = arcmin < 2 ? `${(60 * arcmin).toFixed(1)}″` : `${arcmin.toFixed(1)}′`
  if (arcmin <= Math.max(CORRECTION_ARCMIN, halfLightArcmin ?? 0)) return { check: 'position-moved', level: 'ok', sentence: `The position moves by ${words}.` }
  return { check: 'position-moved', level: 'warn', sentence: `The position of ${galaxy} moves by ${words}, out of the galaxy itself. Is it another galaxy’s?` }
}

import { adopt } from '../adoption/adopt.ts'
import { acceptedUnit, quantity } from '../quantities.ts'
import { canonicalOf, othersOf } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'
import { printed } from './printed.ts'

/** A reading in another unit has to fit this much better before it is suggested. */
const BETTER = 20

/** The number would fit what is known far better in another unit: kpc for Mpc, a distance for a modulus. */
export const unitSlip: MeasurementCheck = (proposed, surroundings) => {
  const { measurement: m } = proposed
  const q = quantity(m.quantity)
  const own = canonicalOf(proposed)
  const known = adopt(q.key, othersOf(proposed, surroundings), surroundings.scale)?.value ?? null
  if (own === null || known === null || m.value === null || q.units.length < 2) return null
  const miss = Math.abs(own.value - known)
  // A magnitude is a logarithm: one of them is far. Of a length, half of itself.
  const far = q.unit === 'mag' ? 1 : Math.abs(known) / 2
  for (const unit of q.units) {
    if (unit === acceptedUnit(q, m.unit)) continue
    const otherwise = unit.toCanonical(m.value)
    if (Number.isFinite(otherwise) && miss > BETTER * Math.abs(otherwise - known) && miss > far) {
      return {
        check: 'unit-slip', level: 'warn',
        sentence: `${m.value} ${m.unit || 'without unit'} is far from the ${printed(known, q.decimals)} ${q.unit} adopted; as ${m.value} ${unit.unit} it would fit. Check the unit.`,
      }
    }
  }
  return null
}

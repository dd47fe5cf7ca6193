/** All checks, in the order in which a reviewer reads them. */
import { agreement } from './agreement.ts'
import { anchorShift } from './anchor-shift.ts'
import { anchorStated } from './anchor-stated.ts'
import { bareGalaxy } from './bare-galaxy.ts'
import type { Check, GalaxyCheck, GalaxySurroundings, MeasurementCheck, MeasurementSurroundings, ProposedAmendment, ProposedAnchor, ProposedGalaxy, ProposedMeasurement } from './check.ts'
import { designationDigits } from './designation-digits.ts'
import { digitSlip } from './digit-slip.ts'
import { elsewhere } from './elsewhere.ts'
import { enteredBefore } from './entered-before.ts'
import { errorBar } from './error-bar.ts'
import { hostChange } from './host-change.ts'
import { methodReach } from './method-reach.ts'
import { nameBorne } from './name-borne.ts'
import { nearGalaxy } from './near-galaxy.ts'
import { positionMoved } from './position-moved.ts'
import { sourceComplete } from './source-complete.ts'
import { unitSlip } from './unit-slip.ts'
import { unlikelyGalaxy } from './unlikely-galaxy.ts'
import { velocityDistance } from './velocity-distance.ts'

const MEASUREMENT_CHECKS: readonly MeasurementCheck[] = [
  unitSlip, digitSlip, enteredBefore, elsewhere, errorBar, anchorStated, agreement, velocityDistance, unlikelyGalaxy, methodReach, hostChange, sourceComplete,
]
const GALAXY_CHECKS: readonly GalaxyCheck[] = [nameBorne, nearGalaxy, bareGalaxy]

/** What the checks say of a measurement that is added or mended; those with nothing to say are silent. */
export function checkMeasurement(proposed: ProposedMeasurement, surroundings: MeasurementSurroundings): Check[] {
  return MEASUREMENT_CHECKS.flatMap((check) => check(proposed, surroundings) ?? [])
}

/** What the checks say of a galaxy that is added. */
export function checkNewGalaxy(proposed: ProposedGalaxy, surroundings: GalaxySurroundings): Check[] {
  return [...GALAXY_CHECKS.flatMap((check) => check(proposed, surroundings) ?? []), ...digitsOf([proposed.designation, ...proposed.names], proposed)]
}

/** What the checks say of a galaxy that gets another position or another name. */
export function checkAmendment(proposed: ProposedAmendment): Check[] {
  return [...[positionMoved(proposed)].flatMap((check) => check ?? []), ...digitsOf(proposed.names, proposed.moved)]
}

/** What the checks say of an anchor that is set. */
export function checkAnchor(proposed: ProposedAnchor): Check[] {
  return [anchorShift(proposed)].flatMap((check) => check ?? [])
}

export { lastValue as checkExclusion } from './last-value.ts'

function digitsOf(names: readonly string[], { ra, dec }: { ra: number; dec: number }): Check[] {
  return names.flatMap((name) => designationDigits(name, ra, dec) ?? [])
}

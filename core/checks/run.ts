/** All checks, in the order in which a reviewer reads them. */
import { agreement } from './agreement.ts'
import { anchorStated } from './anchor-stated.ts'
import type { Check, GalaxyCheck, GalaxySurroundings, MeasurementCheck, MeasurementSurroundings, ProposedGalaxy, ProposedMeasurement } from './check.ts'
import { enteredBefore } from './entered-before.ts'
import { errorBar } from './error-bar.ts'
import { nameBorne } from './name-borne.ts'
import { nearGalaxy } from './near-galaxy.ts'
import { unitSlip } from './unit-slip.ts'

const MEASUREMENT_CHECKS: readonly MeasurementCheck[] = [unitSlip, enteredBefore, errorBar, anchorStated, agreement]
const GALAXY_CHECKS: readonly GalaxyCheck[] = [nameBorne, nearGalaxy]

/** What the checks say of a measurement that is added or mended; those with nothing to say are silent. */
export function checkMeasurement(proposed: ProposedMeasurement, surroundings: MeasurementSurroundings): Check[] {
  return MEASUREMENT_CHECKS.flatMap((check) => check(proposed, surroundings) ?? [])
}

/** What the checks say of a galaxy that is added. */
export function checkNewGalaxy(proposed: ProposedGalaxy, surroundings: GalaxySurroundings): Check[] {
  return GALAXY_CHECKS.flatMap((check) => check(proposed, surroundings) ?? [])
}

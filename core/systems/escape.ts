import { GRAVITATION_MPC_KM2_PER_S2_MSUN } from '../astro/constants.ts'
import { requirePositive, type Mpc, type Msun } from '../astro/units.ts'

/**
 * Speed that escapes from a point mass, sqrt(2 G M / r), km/s. Of an extended halo it is an upper bound inside the halo; to draw it beside
 * satellites is common practice.
 *
 * @param mass - Msun, above 0
 * @param separation - Mpc, above 0
 * @throws RangeError when either is not
 */
export function escapeSpeed(mass: Msun, separation: Mpc): number {
  requirePositive(mass, 'total mass (Msun)')
  requirePositive(separation, 'separation (Mpc)')
  return Math.sqrt((2 * GRAVITATION_MPC_KM2_PER_S2_MSUN * mass) / separation)
}

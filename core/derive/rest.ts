/** Nearer than this a host is the galaxy we are in, Mpc: its whole disc is within, no other galaxy is. */
export const OUR_OWN_WITHIN_MPC = 0.02

/**
 * Velocity of a host that its satellites are held against, Galactic standard of rest, km/s. Our own Galaxy is at rest in that frame by its
 * definition, and has no radial velocity of its own to be measured.
 *
 * @param hostDistance - Mpc; null where it is unknown
 */
export function restOf(hostVelocity: number | null, hostDistance: number | null): number | null {
  return hostVelocity ?? (hostDistance !== null && hostDistance < OUR_OWN_WITHIN_MPC ? 0 : null)
}

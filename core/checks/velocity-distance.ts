import { adopt } from '../adoption/adopt.ts'
import { distanceOf } from '../astro/distance.ts'
import { convert } from '../astro/frames.ts'
import { velocityLocalGroup } from '../astro/velocities.ts'
import type { Measurement } from '../catalogue/types.ts'
import { heldWith } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'
import { printed } from './printed.ts'

/**
 * How far velocities scatter about the Hubble flow nearby, hosts' satellites included, km/s: common practice, no source. The check asks at three
 * times that.
 */
const SCATTER_KM_PER_S = 200

/** The velocity in the Local Group's frame is nothing like the Hubble flow at the distance. */
export const velocityDistance: MeasurementCheck = (proposed, surroundings) => {
  const { quantity } = proposed.measurement
  const { position, scale } = surroundings
  if ((quantity !== 'velocity' && quantity !== 'distance_modulus') || position === null) return null
  const held = heldWith(proposed, surroundings) ?? []
  const of = (key: Measurement['quantity']): number | null => adopt(key, held.filter((m) => m.quantity === key), scale)?.value ?? null
  const [v, modulus] = [of('velocity'), of('distance_modulus')]
  if (v === null || modulus === null) return null
  const { lon, lat } = convert(position.ra, position.dec, 'equatorial', 'galactic')
  const own = velocityLocalGroup(v, lon, lat)
  const distance = distanceOf(modulus)
  const flow = scale.policy.host.hubble * distance
  // A distance is rarely better than a tenth, and the flow is as wrong as it is.
  const z = Math.abs(own - flow) / Math.hypot(SCATTER_KM_PER_S, 0.1 * flow)
  const words = `${printed(own, 0)} km/s in the Local Group’s frame, where ${distance.toFixed(2)} Mpc lets expect about ${printed(flow, 0)} km/s`
  if (z <= 3) return { check: 'velocity-distance', level: 'ok', sentence: `Velocity and distance go together: ${words}.` }
  return { check: 'velocity-distance', level: 'warn', sentence: `${words}: one of the two may be another galaxy’s.` }
}

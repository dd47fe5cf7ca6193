import { distanceOf } from '../astro/distance.ts'
import { method, type MethodKey } from '../methods.ts'
import { scaledOf } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'

/** How far the stars of a method can be told apart, and from where on a flow says something, Mpc: common practice, no source. */
const REACH: Partial<Record<MethodKey, readonly [number, number]>> = {
  'geometric': [0, 0.2], 'eclipsing-binaries': [0, 2], 'rr-lyrae': [0, 3], 'horizontal-branch': [0, 4], 'red-clump': [0, 4], 'hubble-flow': [3, Infinity],
}

/** The method is seldom used at such a distance. */
export const methodReach: MeasurementCheck = (proposed, surroundings) => {
  const { measurement: m } = proposed
  const range = m.quantity === 'distance_modulus' && m.method !== null ? REACH[m.method] : undefined
  const modulus = scaledOf(proposed, surroundings)
  if (!range || modulus === null || m.method === null) return null
  const distance = distanceOf(modulus)
  const { inWords } = method(m.method)
  if (distance > range[1]) return { check: 'method-reach', level: 'warn', sentence: `${distance.toFixed(2)} Mpc is farther than ${inWords} distances usually reach (${range[1]} Mpc). Check method and value.` }
  if (distance < range[0]) return { check: 'method-reach', level: 'warn', sentence: `At ${distance.toFixed(2)} Mpc galaxies’ own motions rival the flow: a ${inWords} distance says little below ${range[0]} Mpc.` }
  return null
}

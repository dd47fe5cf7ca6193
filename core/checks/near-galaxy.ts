import type { GalaxyCheck } from './check.ts'

/** As near as this to the centre of any galaxy, or within its half-light ellipse, a new one may be the same, arcsec. */
const NEAR_ARCSEC = 180

/** So near another galaxy that it may be the same one, or a part of it. */
export const nearGalaxy: GalaxyCheck = (_proposed, { near }) => {
  const found = near.find((g) => g.separationArcsec <= Math.max(NEAR_ARCSEC, 60 * (g.halfLightArcmin ?? 0)))
  if (!found) return { check: 'near-galaxy', level: 'ok', sentence: 'No galaxy of the catalogue is near this position.' }
  const words = found.separationArcsec < 120 ? `${found.separationArcsec.toFixed(0)}″` : `${(found.separationArcsec / 60).toFixed(1)}′`
  if (found.separationArcsec > NEAR_ARCSEC) return { check: 'near-galaxy', level: 'warn', sentence: `It lies within the half-light radius of ${found.name}, ${words} from its centre: is it a galaxy, or a part of that one?` }
  return { check: 'near-galaxy', level: 'warn', sentence: `${found.name} is only ${words} away. If it is the same galaxy, add a name to that one instead.` }
}

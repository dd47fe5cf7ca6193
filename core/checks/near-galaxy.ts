import type { GalaxyCheck } from './check.ts'

/** So near another galaxy that it may be the same one. */
export const nearGalaxy: GalaxyCheck = (_proposed, { near }) => {
  const [nearest] = near
  if (!nearest) return { check: 'near-galaxy', level: 'ok', sentence: 'No galaxy of the catalogue is near this position.' }
  const words = nearest.separationArcsec < 120 ? `${nearest.separationArcsec.toFixed(0)}″` : `${(nearest.separationArcsec / 60).toFixed(1)}′`
  return { check: 'near-galaxy', level: 'warn', sentence: `${nearest.name} is only ${words} away. If it is the same galaxy, add a name to that one instead.` }
}

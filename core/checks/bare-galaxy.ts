import type { GalaxyCheck } from './check.ts'

/** A new galaxy of which nothing is measured has no distance, and no place among the others. */
export const bareGalaxy: GalaxyCheck = (_proposed, { measurements }) => {
  if (measurements > 0) return null
  return { check: 'bare-galaxy', level: 'warn', sentence: 'Nothing is measured of it here: it would stand in the catalogue without a distance. Add a measurement, or say in the summary where one will come from.' }
}

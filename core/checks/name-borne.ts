import type { GalaxyCheck } from './check.ts'

/** One of its names is another galaxy's. */
export const nameBorne: GalaxyCheck = (_proposed, { borne }) => {
  const [first] = borne
  if (!first) return { check: 'name-borne', level: 'ok', sentence: 'Its names are new to the catalogue.' }
  const itself = first.galaxy === first.name
  return { check: 'name-borne', level: 'stop', sentence: itself ? `The catalogue has ${first.galaxy} already. Change that galaxy instead of adding another.` : `“${first.name}” is a name of ${first.galaxy} already. Change that galaxy instead, or leave the name out.` }
}

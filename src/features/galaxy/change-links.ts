import type { ChangeAction, OverrideSubject } from '../../../core/schema/changes.ts'
import type { GalaxyAnswer } from '../../../core/schema/catalogue.ts'
import { paths, withQuery } from '../../paths.ts'

/** Where a change to this galaxy is begun. @param measurement - number of the measurement that it is about */
export function changeAddress(galaxy: Pick<GalaxyAnswer, 'slug' | 'designation'>, add: ChangeAction, measurement?: number): string {
  return withQuery(paths.newSubmission, { add, galaxy: galaxy.slug, name: galaxy.designation, measurement })
}

/** Where an override of one of its adopted values, or of its host, is begun. */
export function overrideAddress(galaxy: Pick<GalaxyAnswer, 'slug' | 'designation'>, add: 'override.set' | 'override.clear', about: OverrideSubject): string {
  return withQuery(paths.newSubmission, { add, galaxy: galaxy.slug, name: galaxy.designation, about })
}

/** Checks a proposed change against the catalogue as it stands and records the version it is made from. */
import type { Knex } from 'knex'
import { movesScale } from '../../../core/schema/changes.ts'
import type { ChangeInput } from '../../../core/schema/changes.ts'
import { BadInput } from '../../http/errors.ts'
import type { FieldError } from '../../http/errors.ts'
import { currentRevision } from './current.ts'
import type { Ground, Say } from './ground.ts'
import { resolveAmendment, resolveNewGalaxy, resolveNewName } from './resolve-galaxies.ts'
import { resolveNewMeasurement, resolveTouched } from './resolve-measurements.ts'
import { resolveOverride } from './resolve-overrides.ts'
import { resolveAnchor, resolvePolicy } from './resolve-scale.ts'
import type { ResolvedChange, StoredChange } from './types.ts'

const REFUSED = 'The change was not kept, and nothing else was touched. Mend the field named here and send it again.'

/**
 * @param siblings - the other changes of the same submission
 * @throws BadInput naming each field that cannot stand
 */
export async function resolveChange(knex: Knex, input: ChangeInput, siblings: readonly StoredChange[]): Promise<ResolvedChange> {
  const errors: FieldError[] = []
  const say: Say = (path, message) => void errors.push({ path, message })
  refuseMixture(input, siblings, say)
  const ground = await groundOf(knex, input, siblings, say)
  if (errors.length > 0) throw new BadInput(REFUSED, errors)
  return { input, base: { atRevision: await currentRevision(knex), ...ground.base }, galaxy: ground.galaxy }
}

function groundOf(knex: Knex, input: ChangeInput, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  switch (input.action) {
    case 'measurement.add':
      return resolveNewMeasurement(knex, input.payload, siblings, say)
    case 'measurement.replace':
    case 'measurement.exclude':
    case 'measurement.restore':
      return resolveTouched(knex, input, siblings, say)
    case 'galaxy.add':
      return resolveNewGalaxy(input.payload, say)
    case 'galaxy.amend':
      return resolveAmendment(knex, input.payload, siblings, say)
    case 'name.add':
      return resolveNewName(knex, input.payload, siblings, say)
    case 'anchor.set':
      return resolveAnchor(knex, input.payload, siblings, say)
    case 'policy.set':
      return resolvePolicy(knex, input.payload, siblings, say)
    case 'override.set':
    case 'override.clear':
      return resolveOverride(knex, input, siblings, say)
  }
}

function refuseMixture(input: ChangeInput, siblings: readonly StoredChange[], say: Say): void {
  if (!siblings.some((c) => movesScale(c.action) !== movesScale(input.action))) return
  say(
    'action',
    movesScale(input.action)
      ? 'A change of the scale is judged alone: this submission holds other changes. Begin another submission for the scale.'
      : 'This submission changes the scale, and a change of the scale is judged alone. Begin another submission for this.',
  )
}

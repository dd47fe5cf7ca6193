/** Who would change host with a measurement: the rule of the assignment asked with it and without, no draws. */
import type { Knex } from 'knex'
import { adopt } from '../../../../core/adoption/adopt.ts'
import type { Adopted, Scale } from '../../../../core/adoption/adopted.ts'
import type { Measurement } from '../../../../core/catalogue/types.ts'
import { heldWith } from '../../../../core/checks/canonical.ts'
import type { HostOutlook } from '../../../../core/checks/check.ts'
import { affectedBy } from '../../../../core/derive/affected.ts'
import { neighbourFrom, withChanges, type Neighbourhood } from '../../../../core/derive/neighbourhood.ts'
import { deriveOwn } from '../../../../core/derive/own.ts'
import { placeIn } from '../../../../core/derive/places.ts'
import { assignedHost, type HostOverrides } from '../../../../core/derive/relation.ts'
import type { QuantityKey } from '../../../../core/quantities.ts'
import { currentRevision } from '../../changes/current.ts'
import { loadGalaxies, loadHostOverrides } from '../../revision/load.ts'
import { surroundingsAt, type Surroundings } from '../../revision/neighbourhood-cache.ts'
import { proposedBy, type MeasurementChange } from './of-measurements.ts'

/** What a table of many rows moves is seen in its effect; here each is looked into by itself. */
const MOST = 12
/** What a galaxy's place or pull depends on. */
const MOVING: ReadonlySet<QuantityKey> = new Set(['distance_modulus', 'b_mag', 'v_mag', 'k_mag', 'ebv', 'morph_t', 'log_mstar'])

/** Outlooks by change; none where a change can move nobody. */
export async function outlooksOf(knex: Knex, changes: readonly MeasurementChange[], heldOf: (galaxy: number | null) => readonly Measurement[], scale: Scale): Promise<Map<number, HostOutlook | 'many'>> {
  const moving = changes.filter((c) => c.galaxy !== null && MOVING.has(c.payload.measurement.quantity))
  if (moving.length === 0) return new Map()
  if (moving.length > MOST) return new Map(moving.map((c) => [c.id, 'many']))
  const revision = await currentRevision(knex)
  if (revision === 0) return new Map()
  const surroundings = await surroundingsAt(knex, revision)
  const overrides = await loadHostOverrides(knex)
  const galaxies = new Map((await loadGalaxies(knex, moving.flatMap((c) => c.galaxy ?? []))).map((g) => [g.id, g]))
  return new Map(
    moving.flatMap((c) => {
      const galaxy = galaxies.get(c.galaxy ?? 0)
      const held = heldWith({ ...proposedBy(c) }, { held: heldOf(c.galaxy), sourceLabel: '' })
      if (!galaxy || !held) return []
      const neighbour = neighbourFrom(galaxy.id, deriveOwn(galaxy, adoptedOf(held, scale), held))
      return [[c.id, outlook(surroundings, withChanges(surroundings.neighbourhood, new Map([[galaxy.id, neighbour]])), galaxy.id, scale, overrides)] as const]
    }),
  )
}

function adoptedOf(held: readonly Measurement[], scale: Scale): Map<QuantityKey, Adopted> {
  return new Map(
    [...new Set(held.map((m) => m.quantity))].flatMap((key) => {
      const value = adopt(key, held.filter((m) => m.quantity === key), scale)
      return value ? [[key, value] as const] : []
    }),
  )
}

function outlook({ neighbourhood, places }: Surroundings, after: Neighbourhood, id: number, scale: Scale, overrides: HostOverrides): HostOutlook {
  const nameOf = (n: Neighbourhood, host: number | null): string | null => (host === null ? null : (n.galaxies[n.indexOf.get(host) ?? -1]?.name ?? null))
  const now = (galaxy: number): number | null => {
    const place = placeIn(neighbourhood, places, galaxy)
    return place?.isSatellite ? place.mainDisturber : null
  }
  const moves = [...affectedBy(neighbourhood, places, after, new Set([id]), scale.policy.host)].flatMap((galaxy) => {
    const before = now(galaxy)
    const then = assignedHost(after, galaxy, scale.policy, overrides)?.id ?? null
    return before === then ? [] : [{ galaxy, name: nameOf(after, galaxy) ?? nameOf(neighbourhood, galaxy) ?? '', before: nameOf(neighbourhood, before), after: nameOf(after, then) }]
  })
  const own = moves.find((m) => m.galaxy === id)
  const host = nameOf(neighbourhood, now(id))
  return {
    own: own ? { before: own.before, after: own.after } : { before: host, after: host },
    satellites: moves.filter((m) => m.galaxy !== id).map(({ galaxy: _, ...move }) => move).sort((a, b) => a.name.localeCompare(b.name, 'en')),
  }
}

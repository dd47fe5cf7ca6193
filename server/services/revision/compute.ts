/**
 * What a revision does to the adopted values and the catalogue's rows: everything that depends on what was touched computed, nothing written.
 * The effect that an approver is shown and what approving then does are this one computation. (When the scale changes everything does
 * depend on it: whole/recompute.ts.)
 */
import type { Knex } from 'knex'
import type { Scale } from '../../../core/adoption/adopted.ts'
import { affectedBy } from '../../../core/derive/affected.ts'
import { neighbourFrom, withChanges, type Neighbour, type Neighbourhood } from '../../../core/derive/neighbourhood.ts'
import { spansAfter } from '../../../core/derive/possible-hosts.ts'
import { placeIn } from '../../../core/derive/places.ts'
import type { OwnColumns } from '../../../core/derive/own.ts'
import { NOWHERE, relationFinder, relationsOf, type HostOverrides, type PossibleHost, type Relation } from '../../../core/derive/relation.ts'
import { rowOf } from '../../../core/derive/row.ts'
import { adoptGalaxies } from './adopt-galaxies.ts'
import { adoptedDifferences, sameRow, standingRows, type StoredRow } from './compare.ts'
import { loadHostOverrides, loadScale } from './load.ts'
import { surroundingsAt, type Surroundings } from './neighbourhood-cache.ts'
import type { PlannedAdopted, PlannedRow, RevisionPlan } from './plan.ts'

export type { RevisionPlan } from './plan.ts'

export interface Touched {
  /** The revision that would be made: one more than the newest. */
  revision: number
  /** Galaxies whose own record, names or measurements changed in this transaction. */
  touched: Iterable<number>
}

/** Galaxies whose measurements are in memory at a time. */
const CHUNK = 2000

export async function computeRevision(trx: Knex, { revision, touched }: Touched): Promise<RevisionPlan> {
  const scale = await loadScale(trx)
  const surroundings = await surroundingsAt(trx, revision - 1)
  const ids = [...new Set(touched)]
  const own = new Map<number, OwnColumns>()
  const adopted: PlannedAdopted[] = []
  for (let i = 0; i < ids.length; i += CHUNK) {
    const computed = await adoptGalaxies(trx, ids.slice(i, i + CHUNK), scale)
    adopted.push(...(await adoptedDifferences(trx, computed)))
    for (const c of computed) own.set(c.galaxy.id, c.own)
  }
  const rows = await place(trx, own, surroundings, scale)
  return { revision, rows, adopted, before: surroundings }
}

/** From so many on, the search through a tree is worth planting it. */
const MANY = 200

/** Rows of everybody whose own columns or place among the others would differ. */
async function place(trx: Knex, own: ReadonlyMap<number, OwnColumns>, before: Surroundings, scale: Scale): Promise<PlannedRow[]> {
  const moved = movedNeighbours(own, before.neighbourhood)
  const after = withChanges(before.neighbourhood, moved)
  spansAfter(before.neighbourhood, after, moved.keys(), scale.policy.host)
  const affected = affectedBy(before.neighbourhood, before.places, after, new Set(moved.keys()), scale.policy.host)
  const overrides = await loadHostOverrides(trx)
  const assigned = [...overrides].flatMap(([id, host]) => (host !== null && moved.has(host) ? [id] : []))
  const asked = new Set([...affected, ...assigned, ...own.keys()])
  const relations = relationsAmong(after, asked, scale, overrides)
  const gains = satelliteGains(relations, before)
  const satellitesOf = (id: number): number => (before.satellites.get(id) ?? 0) + (gains.get(id) ?? 0)
  const ids = [...new Set([...relations.keys(), ...gains.keys()])]
  const standing = await standingRows(trx, ids)
  return ids.flatMap((id): PlannedRow[] => {
    const stored = standing.get(id)
    const columns = own.get(id) ?? stored
    if (!columns) return []
    // A host whose satellites alone came or went keeps its place.
    const place = relations.get(id) ?? { ...NOWHERE, ...placeIn(before.neighbourhood, before.places, id), columns: {}, possibleHosts: possibleHostsIn(stored) }
    const row = rowOf(columns, place, satellitesOf(id) > 0)
    const planned = { galaxyId: id, before: stored ?? null, after: row, mainDisturber: place.mainDisturber, indexDisturber: place.indexDisturber, possibleHosts: place.possibleHosts }
    return sameRow(planned) ? [] : [planned]
  })
}

function relationsAmong(n: Neighbourhood, asked: ReadonlySet<number>, { policy }: Scale, overrides: HostOverrides): Map<number, Relation> {
  if (asked.size >= MANY) return relationsOf(n, asked, policy, overrides)
  const find = relationFinder(n, policy, overrides)
  return new Map([...asked].map((id) => [id, find(id)]))
}

function possibleHostsIn(stored: StoredRow | undefined): readonly PossibleHost[] {
  return stored ? (JSON.parse(stored.possible_hosts) as PossibleHost[]) : []
}

/** Galaxies whose place or pull differs from before; null for one that left. */
function movedNeighbours(own: ReadonlyMap<number, OwnColumns>, before: Neighbourhood): Map<number, Neighbour | null> {
  const moved = new Map<number, Neighbour | null>()
  for (const [id, columns] of own) {
    const is = neighbourFrom(id, columns)
    const index = before.indexOf.get(id)
    const was = index === undefined ? null : (before.galaxies[index] ?? null)
    if (!sameNeighbour(was, is)) moved.set(id, is)
  }
  return moved
}

function sameNeighbour(a: Neighbour | null, b: Neighbour | null): boolean {
  if (a === null || b === null) return a === b
  return (Object.keys(a) as (keyof Neighbour)[]).every((key) => a[key] === b[key])
}

/** How many satellites each host gains, those included that gain as many as they lose. */
function satelliteGains(relations: ReadonlyMap<number, Relation>, { neighbourhood, places }: Surroundings): Map<number, number> {
  const gains = new Map<number, number>()
  for (const [id, relation] of relations) {
    const was = placeIn(neighbourhood, places, id)
    const before = was?.isSatellite ? was.mainDisturber : null
    const now = relation.isSatellite ? relation.mainDisturber : null
    if (before === now) continue
    if (before !== null) gains.set(before, (gains.get(before) ?? 0) - 1)
    if (now !== null) gains.set(now, (gains.get(now) ?? 0) + 1)
  }
  return gains
}

/**
 * What a revision does to the adopted values and the catalogue's rows: everything computed, nothing written. The effect that an approver is
 * shown and what approving then does are this one computation.
 */
import type { Knex } from 'knex'
import type { Scale } from '../../../core/adoption/adopted.ts'
import type { CatalogueRow } from '../../../core/columns.ts'
import { affectedBy } from '../../../core/derive/affected.ts'
import { neighbourFrom, withChanges, type Neighbour, type Neighbourhood, type Place } from '../../../core/derive/neighbourhood.ts'
import type { OwnColumns } from '../../../core/derive/own.ts'
import { relationOf, relationWord, type Relation } from '../../../core/derive/relation.ts'
import { adoptGalaxies } from './adopt-galaxies.ts'
import { adoptedDifferences, sameRow, standingRows, type StoredRow } from './compare.ts'
import { allGalaxies, loadScale } from './load.ts'
import { surroundingsAt, type Surroundings } from './neighbourhood-cache.ts'
import type { PlannedRow, RevisionPlan } from './plan.ts'

export type { RevisionPlan } from './plan.ts'

export interface Touched {
  /** The revision that would be made: one more than the newest. */
  revision: number
  /** Galaxies whose own record, names or measurements changed in this transaction. */
  touched: Iterable<number>
  /** Anchors or policy changed, which touches every galaxy. */
  scaleChanged?: boolean
}

export async function computeRevision(trx: Knex, { revision, touched, scaleChanged }: Touched): Promise<RevisionPlan> {
  const scale = await loadScale(trx)
  const surroundings = await surroundingsAt(trx, revision - 1)
  const ids = scaleChanged ? await allGalaxies(trx) : [...new Set(touched)]
  const computed = await adoptGalaxies(trx, ids, scale)
  const adopted = await adoptedDifferences(trx, computed)
  const own = new Map(computed.map((c) => [c.galaxy.id, c.own]))
  const rows = await place(trx, own, surroundings, scale)
  return { revision, rows, adopted, ...membersOf(surroundings) }
}

/** Rows of everybody whose own columns or place among the others would differ. */
async function place(trx: Knex, own: ReadonlyMap<number, OwnColumns>, before: Surroundings, scale: Scale): Promise<PlannedRow[]> {
  const moved = movedNeighbours(own, before.neighbourhood)
  const after = withChanges(before.neighbourhood, moved)
  const affected = affectedBy(before.neighbourhood, after, new Set(moved.keys()), (id) => before.places.get(id), scale.policy.host.massRatio)
  const relations = new Map<number, Relation>()
  for (const id of new Set([...affected, ...own.keys()])) relations.set(id, relationOf(after, id, scale.policy))
  const hosts = hostsTouched(relations, before.places)
  const placeAfter = (id: number): Place | undefined => relations.get(id) ?? before.places.get(id)
  const hosting = withSatellites(after, before.places, relations, new Set([...hosts, ...relations.keys()]))
  const standing = await standingRows(trx, [...new Set([...relations.keys(), ...hosts])])
  return [...new Set([...relations.keys(), ...hosts])].flatMap((id): PlannedRow[] => {
    const stored = standing.get(id)
    const columns = own.get(id) ?? stored
    if (!columns) return []
    const where = placeAfter(id)
    const word = relationWord(where?.isSatellite ?? false, hosting.has(id))
    const row: CatalogueRow = { ...columns, ...(relations.get(id)?.columns ?? {}), host_relation: word }
    const planned = { galaxyId: id, before: stored ?? null, after: row, mainDisturber: where?.mainDisturber ?? null, indexDisturber: where?.indexDisturber ?? null }
    return stored && sameRow(stored, row) && sameDisturbers(stored, planned) ? [] : [planned]
  })
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

/** Hosts that gain or lose a satellite: they may become hosts, or stop being so. */
function hostsTouched(relations: ReadonlyMap<number, Relation>, places: ReadonlyMap<number, Place>): Set<number> {
  const hosts = new Set<number>()
  for (const [id, relation] of relations) {
    const was = places.get(id)
    const before = was?.isSatellite ? was.mainDisturber : null
    const now = relation.isSatellite ? relation.mainDisturber : null
    if (before === now) continue
    if (before !== null) hosts.add(before)
    if (now !== null) hosts.add(now)
  }
  return hosts
}

/** Which of these galaxies have a satellite, afterwards. */
function withSatellites(after: Neighbourhood, places: ReadonlyMap<number, Place>, relations: ReadonlyMap<number, Relation>, asked: ReadonlySet<number>): Set<number> {
  const hosting = new Set<number>()
  for (const id of after.ids) {
    const where = relations.get(id) ?? places.get(id)
    if (where?.isSatellite && where.mainDisturber !== null && asked.has(where.mainDisturber)) hosting.add(where.mainDisturber)
  }
  return hosting
}

function sameDisturbers(stored: StoredRow, planned: PlannedRow): boolean {
  return stored.main_disturber_galaxy === planned.mainDisturber && stored.index_disturber_galaxy === planned.indexDisturber
}

function membersOf({ neighbourhood, places }: Surroundings): Pick<RevisionPlan, 'members' | 'names'> {
  const members = new Map<string, number>()
  const names = new Map(neighbourhood.galaxies.map((g) => [g.slug, g.name]))
  for (const { mainDisturber, isSatellite } of places.values()) {
    const index = isSatellite && mainDisturber !== null ? neighbourhood.indexOf.get(mainDisturber) : undefined
    const slug = index === undefined ? undefined : neighbourhood.galaxies[index]?.slug
    if (slug !== undefined) members.set(slug, (members.get(slug) ?? 0) + 1)
  }
  return { members, names }
}

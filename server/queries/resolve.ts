/** Which galaxies somebody may mean by a name, however it is written, or by a position. */
import type { Knex } from 'knex'
import { readPosition } from '../../core/astro/position-reader.ts'
import { unitVector } from '../../core/astro/sphere.ts'
import { radians } from '../../core/astro/units.ts'
import { nameKey } from '../../core/names.ts'
import type { Resolved } from '../../core/schema/catalogue.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'

const MOST = 20
/** Names looked at for a match: a word of two letters may begin a hundred thousand. */
const MOST_CANDIDATES = 1000
/** A typed position means what lies within this, deg. */
const POSITION_RADIUS_DEG = 0.5

type Match = Resolved['matches'][number]

/**
 * Exact matches of the key of any name first, then names that begin with it, then names that hold it; names like it only where these find
 * nothing, since that search is a hundred times slower. A position finds the galaxies around it, nearest first.
 */
export async function resolveName(knex: Knex, name: string, revision: ReadRevision): Promise<Resolved> {
  const position = readPosition(name)
  if (position.ok) {
    const around = await nearPosition(knex, position.ra, position.dec, revision)
    if (around.length > 0) return { matches: around }
  }
  const key = nameKey(name)
  if (key === '') return { matches: [] }
  const exact = await byKey(knex, { sql: 'n.name_key = ?', bindings: [key] }, 'true', revision)
  if (exact.length >= MOST) return { matches: exact }
  // The index on text patterns serves LIKE 'key%'; keys hold letters and digits only.
  const beginning = await byKey(knex, { sql: 'n.name_key LIKE ? AND n.name_key <> ?', bindings: [`${key}%`, key] }, 'false', revision)
  const found = merged(exact, beginning)
  const holding = found.length < MOST && key.length >= 2 ? await byKey(knex, { sql: 'n.name_key LIKE ?', bindings: [`_%${key}%`] }, 'false', revision) : []
  const all = merged(found, holding)
  if (all.length > 0 || key.length < 3) return { matches: all }
  return { matches: await alike(knex, key, revision) }
}

/** The same galaxy by two names counts once, by the first. */
function merged(first: readonly Match[], then: readonly Match[]): Match[] {
  const known = new Set(first.map((match) => match.slug))
  return [...first, ...then.filter((match) => !known.has(match.slug))].slice(0, MOST)
}

async function byKey(knex: Knex, condition: { sql: string; bindings: string[] }, exact: 'true' | 'false', revision: ReadRevision): Promise<Match[]> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: Match[] }>(
    `SELECT slug, name, matched, class, ra, dec, exact FROM (
       SELECT DISTINCT ON (c.galaxy) c.slug, c.name, n.name AS matched, c.class, c.ra, c.dec, ${exact} AS exact, length(n.name_key) AS size
       FROM (SELECT * FROM galaxy_names n WHERE ${condition.sql} AND ${holds.sql('n')} LIMIT ${MOST_CANDIDATES}) AS n
       JOIN catalogue_rows c ON c.galaxy = n.galaxy AND ${holds.sql('c')} AND c.status <> 'withdrawn'
       ORDER BY c.galaxy, n.preferred DESC, length(n.name_key), n.name
     ) AS found ORDER BY size, matched COLLATE "C" LIMIT ${MOST}`,
    [...condition.bindings, ...holds.bindings, ...holds.bindings],
  )
  return answer.rows
}

async function alike(knex: Knex, key: string, revision: ReadRevision): Promise<Match[]> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: Match[] }>(
    `SELECT slug, name, matched, class, ra, dec, false AS exact FROM (
       SELECT DISTINCT ON (c.galaxy) c.slug, c.name, n.name AS matched, c.class, c.ra, c.dec, similarity(n.name_key, ?) AS likeness
       FROM galaxy_names n JOIN catalogue_rows c ON c.galaxy = n.galaxy AND ${holds.sql('c')}
       WHERE n.name_key % ? AND ${holds.sql('n')} AND c.status <> 'withdrawn'
       ORDER BY c.galaxy, likeness DESC, n.name
     ) AS found ORDER BY likeness DESC, matched COLLATE "C" LIMIT ${MOST}`,
    [key, ...holds.bindings, key, ...holds.bindings],
  )
  return answer.rows
}

async function nearPosition(knex: Knex, ra: number, dec: number, revision: ReadRevision): Promise<Match[]> {
  const holds = holdsAt(revision)
  const centre = `(${unitVector(ra, dec).join(',')})`
  const chord = 2 * Math.sin(radians(POSITION_RADIUS_DEG) / 2)
  const answer = await knex.raw<{ rows: Match[] }>(
    `SELECT slug, name, name AS matched, class, ra, dec, false AS exact FROM catalogue_rows
     WHERE unit_vector <@ cube_enlarge(?::cube, ?::float8, 3) AND unit_vector <-> ?::cube <= ?::float8 AND status <> 'withdrawn' AND ${holds.sql()}
     ORDER BY unit_vector <-> ?::cube, galaxy LIMIT ${MOST}`,
    [centre, chord, centre, chord, ...holds.bindings, centre],
  )
  return answer.rows
}

/** The galaxies nearest to one in three dimensions. */
import type { Knex } from 'knex'
import { holdsAt, partsAt, type ReadRevision } from './at-revision.ts'

const MOST = 12

/**
 * The answer of `GET /api/galaxies/:slug/neighbours` as JSON text: separations in kpc, distances in Mpc, nearest first. Empty for a galaxy
 * without a distance.
 */
export async function neighboursText(knex: Knex, galaxy: number, revision: ReadRevision): Promise<string> {
  const holds = holdsAt(revision)
  const centre = await knex.raw<{ rows: { centre: string | null }[] }>(
    `SELECT sg_position::text AS centre FROM catalogue_rows WHERE galaxy = ? AND ${holds.sql()}`,
    [galaxy, ...holds.bindings],
  )
  const point = centre.rows[0]?.centre ?? null
  if (point === null) return JSON.stringify({ revision: revision.number, neighbours: [] })
  // Each part by itself, so that the index gives the nearest without looking at the others.
  const parts = partsAt(revision)
  const nearest = parts.map(
    (part) => `(SELECT slug, name, class, distance, sg_position <-> ?::cube AS apart, galaxy FROM catalogue_rows
      WHERE ${part.sql} AND sg_position IS NOT NULL AND galaxy <> ? AND status <> 'withdrawn' ORDER BY sg_position <-> ?::cube LIMIT ${MOST})`,
  )
  const answer = await knex.raw<{ rows: { text: string }[] }>(
    `SELECT json_build_object('revision', ?::integer, 'neighbours', coalesce(json_agg(
       json_build_object('slug', slug, 'name', name, 'class', class, 'separation', 1000 * apart, 'distance', distance) ORDER BY apart, galaxy), '[]'))::text AS text
     FROM (SELECT * FROM (${nearest.join(' UNION ALL ')}) AS each ORDER BY apart, galaxy LIMIT ${MOST}) AS found`,
    [revision.number, ...parts.flatMap((part) => [point, ...part.bindings, galaxy, point])],
  )
  const [row] = answer.rows
  if (!row) throw new Error('the neighbours query gave no row')
  return row.text
}

/** Which revision a reader reads, and the conditions that make a versioned table show it. */
import type { Knex } from 'knex'
import { can } from '../../core/permissions.ts'
import { BadInput, Forbidden, NotFound } from '../http/errors.ts'
import type { Reader } from '../http/route.ts'
import { preparedRows } from './prepared.ts'

/** The revision that an answer is read at. */
export interface ReadRevision {
  /** 0 while the catalogue has no revision at all. */
  number: number
  /** Whether it is the newest one, so that current rows (`rev_to IS NULL`) are its rows. */
  current: boolean
  /** The release by which it was chosen, where it was. */
  release: string | null
}

interface Found {
  newest: number | null
  revision: number | null
  label: string | null
}

/**
 * The revision that this reader reads: visitors the newest release, people who signed in the newest revision, or the one that `at` names.
 *
 * @param at - a release label, or (for those who signed in) a revision number
 * @throws NotFound when nothing is released, or the release or revision does not exist; Forbidden when a visitor asks for a bare revision
 */
export async function readRevision(knex: Knex, reader: Pick<Reader, 'permissions'>, at?: string | null): Promise<ReadRevision> {
  const mayReadAll = can(reader.permissions, 'catalogue.read-current')
  if (at != null) return chosen(knex, at, mayReadAll)
  if (mayReadAll) {
    const found = await one(knex, 'SELECT max(number) AS newest, NULL::integer AS revision, NULL AS label FROM revisions', [])
    return { number: found?.newest ?? 0, current: true, release: null }
  }
  const found = await one(
    knex,
    `SELECT (SELECT max(number) FROM revisions) AS newest, revision, label FROM releases
     ORDER BY revision DESC, published_at DESC LIMIT 1`,
    [],
  )
  if (!found) throw new NotFound('No release is published yet, so there is nothing to read without signing in. Nothing is wrong: come back after the first release, or sign in.')
  return asRead(found)
}

async function chosen(knex: Knex, at: string, mayReadAll: boolean): Promise<ReadRevision> {
  const released = await one(knex, 'SELECT (SELECT max(number) FROM revisions) AS newest, revision, label FROM releases WHERE label = ?', [at])
  if (released) return asRead(released)
  if (!/^\d+$/.test(at)) throw new NotFound(`No release is called "${at}". The releases are listed at /api/releases.`)
  if (!mayReadAll) throw new Forbidden('Without signing in only releases can be read: give the label of a release, or sign in to read a revision by its number.')
  const number = Number(at)
  if (number < 1 || number > 2_147_483_647) throw new BadInput('A revision is a whole number from 1.', [{ path: 'at', message: 'A revision is a whole number from 1.' }])
  const found = await one(knex, 'SELECT (SELECT max(number) FROM revisions) AS newest, number AS revision, NULL AS label FROM revisions WHERE number = ?', [number])
  if (!found) throw new NotFound(`There is no revision ${number} yet.`)
  return asRead(found)
}

async function one(knex: Knex, sql: string, bindings: Knex.RawBinding[]): Promise<Found | undefined> {
  const [found] = await preparedRows<Found>(knex, sql, bindings)
  return found
}

function asRead({ newest, revision, label }: Found): ReadRevision {
  const number = revision ?? 0
  return { number, current: number === newest, release: label }
}

/** A piece of SQL with its values, in knex's notation (`?`). */
export interface Fragment {
  sql: string
  bindings: readonly Knex.RawBinding[]
}

/** A condition of a versioned table under an alias (none: the table's own columns). */
export interface Holds {
  sql: (alias?: string) => string
  bindings: readonly Knex.RawBinding[]
}

type At = Pick<ReadRevision, 'number' | 'current'>

/** Holds at the revision: for a WHERE clause over a versioned table. */
export function holdsAt(revision: At): Holds {
  const of = (alias?: string): string => (alias === undefined ? '' : `${alias}.`)
  if (revision.current) return { sql: (alias) => `${of(alias)}rev_to IS NULL`, bindings: [] }
  return {
    sql: (alias) => `(${of(alias)}rev_from <= ? AND (${of(alias)}rev_to IS NULL OR ${of(alias)}rev_to > ?))`,
    bindings: [revision.number, revision.number],
  }
}

/**
 * The same as disjoint parts that each fit an index: what holds still, and what was closed since. A past revision then costs what the newest
 * costs, plus what changed after it.
 */
export function partsAt(revision: At): Fragment[] {
  if (revision.current) return [{ sql: 'rev_to IS NULL', bindings: [] }]
  return [
    { sql: 'rev_to IS NULL AND rev_from <= ?', bindings: [revision.number] },
    { sql: 'rev_to > ? AND rev_from <= ?', bindings: [revision.number, revision.number] },
  ]
}

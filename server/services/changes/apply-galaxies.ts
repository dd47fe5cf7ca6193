/** New galaxies, amended ones, and names. */
import type { Knex } from 'knex'
import { nameKey, slugOf } from '../../../core/names.ts'
import type { Application } from './apply.ts'
import { galaxyOf } from './apply.ts'
import { galaxiesById } from './current.ts'
import { insertMany } from './insert-many.ts'
import type { StoredChangeOf } from './types.ts'

export async function applyNewGalaxies(application: Application, changes: readonly StoredChangeOf<'galaxy.add'>[]): Promise<void> {
  if (changes.length === 0) return
  const { trx, revision } = application
  const made = (await trx.raw('INSERT INTO galaxies (created_at) SELECT now() FROM generate_series(1, ?) RETURNING id', [changes.length])) as { rows: { id: number }[] }
  const slugs = await freeSlugs(trx, changes.map((c) => slugOf(c.payload.designation)))
  const added = changes.map((c, i) => ({ c, galaxy: made.rows[i]?.id ?? 0, slug: slugs[i] ?? '' }))
  await insertMany(
    trx,
    'galaxyVersions',
    added.map(({ c: { payload: p }, galaxy, slug }) => ({
      galaxy, slug, designation: p.designation, status: p.status, ra: p.ra, dec: p.dec, class: p.class, note: p.note, revFrom: revision,
    })),
  )
  await insertMany(
    trx,
    'galaxyNames',
    added.flatMap(({ c: { payload: p }, galaxy }) =>
      [p.designation, ...p.names].map((name, i) => ({ galaxy, name, nameKey: nameKey(name), preferred: i === 0, source: null, revFrom: revision })),
    ),
  )
  for (const { c, galaxy } of added) {
    application.added.set(c.id, galaxy)
    application.galaxies.set(c.id, galaxy)
    application.touched.add(galaxy)
  }
}

/** How many slugs of one stem are asked for at a time. */
const STEP = 20

/**
 * The first slugs that no galaxy has or ever had, so that old links never lead to new galaxies: ostrel, then ostrel-2, ostrel-3. In the order
 * of what is wanted.
 */
async function freeSlugs(trx: Knex, wanted: readonly string[]): Promise<string[]> {
  const taken = new Set<string>()
  const asked = new Set<string>()
  const nth = (stem: string, n: number): string => (n === 1 ? stem : `${stem}-${n}`)
  const ask = async (stems: readonly string[], from: number): Promise<void> => {
    const slugs = [...new Set(stems)].flatMap((stem) => Array.from({ length: STEP }, (_, i) => nth(stem, from + i))).filter((slug) => !asked.has(slug))
    const { rows } = (await trx.raw('SELECT DISTINCT slug FROM galaxy_versions WHERE slug = ANY(?)', [slugs])) as { rows: { slug: string }[] }
    for (const { slug } of rows) taken.add(slug)
    for (const slug of slugs) asked.add(slug)
  }
  await ask(wanted, 1)
  const free: string[] = []
  for (const stem of wanted) {
    let n = 1
    for (; taken.has(nth(stem, n)); n += 1) if (!asked.has(nth(stem, n + 1))) await ask([stem], n + 1)
    taken.add(nth(stem, n))
    free.push(nth(stem, n))
  }
  return free
}

/** A galaxy keeps its slug when its designation changes, so that links hold; the old designation stays as a name. */
export async function applyAmendments(application: Application, changes: readonly StoredChangeOf<'galaxy.amend'>[]): Promise<void> {
  const { trx, revision } = application
  const held = await galaxiesById(trx, changes.flatMap((c) => c.galaxy ?? []))
  const amended = changes.flatMap((c) => {
    const now = c.galaxy === null ? undefined : held.get(c.galaxy)
    if (!now) throw new Error(`change ${c.id} amends a galaxy that is not held`)
    const set = Object.fromEntries(Object.entries(c.payload.set).filter(([, value]) => value !== undefined)) as typeof c.payload.set
    return [{ now, next: { ...now, ...set } }]
  })
  if (amended.length === 0) return
  await trx('galaxyVersions').whereRaw('id = ANY(?)', [amended.map((a) => a.now.versionId)]).update({ revTo: revision })
  await insertMany(
    trx,
    'galaxyVersions',
    amended.map(({ next }) => ({
      galaxy: next.id, slug: next.slug, designation: next.designation, status: next.status, ra: next.ra, dec: next.dec, class: next.class, note: next.note, revFrom: revision,
    })),
  )
  for (const { now, next } of amended) {
    application.touched.add(now.id)
    if (next.designation !== now.designation) await preferName(trx, now.id, next.designation, revision)
  }
}

/** Makes one name the preferred one; it may be held as another name already. */
async function preferName(trx: Knex.Transaction, galaxy: number, name: string, revision: number): Promise<void> {
  const ended = (await trx('galaxyNames')
    .where({ galaxy })
    .whereNull('revTo')
    .andWhere((either) => void either.where({ preferred: true }).orWhere({ name }))
    .update({ revTo: revision }, ['name', 'nameKey', 'source'])) as { name: string; nameKey: string; source: number | null }[]
  const others = ended.filter((n) => n.name !== name).map((n) => ({ galaxy, ...n, preferred: false, revFrom: revision }))
  const source = ended.find((n) => n.name === name)?.source ?? null
  await insertMany(trx, 'galaxyNames', [...others, { galaxy, name, nameKey: nameKey(name), source, preferred: true, revFrom: revision }])
}

export async function applyNewNames(application: Application, changes: readonly StoredChangeOf<'name.add'>[]): Promise<void> {
  await insertMany(
    application.trx,
    'galaxyNames',
    changes.map((c) => ({
      galaxy: galaxyOf(application, c), name: c.payload.name, nameKey: nameKey(c.payload.name), preferred: false, source: c.payload.sourceId, revFrom: application.revision,
    })),
  )
}

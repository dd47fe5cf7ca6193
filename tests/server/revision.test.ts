import type { Knex } from 'knex'
import { beforeAll, describe, expect, it } from 'vitest'
import { random } from '../../core/random.ts'
import { openDatabase } from '../../server/database.ts'
import { computeRevision } from '../../server/services/revision/compute.ts'
import { effectOf } from '../../server/services/revision/effect.ts'
import { rebuildCatalogue } from '../../server/services/revision/rebuild.ts'
import { writeRevision } from '../../server/services/revision/write.ts'
import { useTestDatabase } from './harness/database.ts'
import {
  addGalaxy, addMeasurement, amendGalaxy, approve, changeScale, currentRevision, excludeMeasurement, laySources, propose, replaceMeasurement, setHost, setOverride, several, type Change,
} from './revision/shifting.ts'

const database = useTestDatabase()
const ANY: readonly Change[] = [addGalaxy, addMeasurement, addMeasurement, replaceMeasurement, replaceMeasurement, excludeMeasurement, amendGalaxy, amendGalaxy, setOverride, setHost, setHost, several, changeScale]

/** Ends a transaction of which nothing is to stay. */
class Undone extends Error {}

async function undone(knex: Knex, work: (trx: Knex.Transaction) => Promise<void>): Promise<void> {
  await expect(
    knex.transaction(async (trx) => {
      await work(trx)
      throw new Undone()
    }),
  ).rejects.toThrow(Undone)
}

/** What stands, without what says when and by which version it came. */
async function standing(knex: Knex): Promise<{ rows: Record<string, unknown>[]; adopted: Record<string, unknown>[] }> {
  const current = async (table: string, order: string): Promise<Record<string, unknown>[]> => {
    const { rows } = (await knex.raw(`select to_jsonb(t) - '{id,rev_from,rev_to,revision,updated_at}'::text[] as row from ${table} t where rev_to is null order by ${order}`)) as { rows: { row: Record<string, unknown> }[] }
    return rows.map((r) => r.row)
  }
  return { rows: await current('catalogue_rows', 'galaxy'), adopted: await current('adopted_values', 'galaxy, quantity') }
}

/** That the catalogue is the very one that computing everything from nothing gives; then everything is as before. */
async function expectAsRebuilt(knex: Knex): Promise<void> {
  const stands = await standing(knex)
  await undone(knex, async (trx) => {
    await trx('catalogueRows').delete()
    await trx('adoptedValues').delete()
    await rebuildCatalogue(trx, await currentRevision(trx))
    const rebuilt = await standing(trx)
    expect(stands.adopted).toEqual(rebuilt.adopted)
    expect(stands.rows).toEqual(rebuilt.rows)
  })
}

beforeAll(async () => {
  const { knex } = database()
  await laySources(knex)
  const draw = random(3)
  for (let i = 0; i < 40; i++) await approve(knex, draw, addGalaxy)
})

describe('a revision', () => {
  it.each([11, 12, 13])('leaves the catalogue that a rebuilding would, whatever is changed (seed %i)', async (seed) => {
    const { knex } = database()
    const draw = random(seed)
    for (let step = 0; step < 24; step++) {
      await approve(knex, draw, draw.pick(ANY))
      if (step % 4 === 3) await expectAsRebuilt(knex)
    }
    const { rows } = await standing(knex)
    const relations = new Set(rows.map((r) => r.host_relation))
    // The crowd is worth testing with: there are hosts, satellites and loners in it.
    expect([...relations].sort()).toEqual(['field', 'host', 'satellite'])
  })

  it('writes only rows that differ, and closes those that they follow', async () => {
    const { knex } = database()
    const draw = random(5)
    for (let i = 0; i < 6; i++) {
      const before = await standing(knex)
      const plan = await approve(knex, draw, addMeasurement)
      const { rows: begun } = (await knex.raw('select galaxy, host_relation from catalogue_rows where rev_from = ?', [plan.revision])) as { rows: { galaxy: number }[] }
      const { rows: ended } = (await knex.raw('select galaxy from catalogue_rows where rev_to = ?', [plan.revision])) as { rows: { galaxy: number }[] }
      const after = await standing(knex)
      const byGalaxy = new Map(before.rows.map((r) => [r.galaxy, JSON.stringify(r)]))
      const differing = after.rows.filter((r) => byGalaxy.get(r.galaxy) !== JSON.stringify(r)).map((r) => r.galaxy)
      expect(begun.map((r) => r.galaxy).sort()).toEqual(differing.sort())
      expect(ended.map((r) => r.galaxy).sort()).toEqual(differing.sort())
    }
  })

  it('has no effect when nothing changed', async () => {
    const { knex } = database()
    await undone(knex, async (trx) => {
      const { rows } = (await trx.raw('select distinct galaxy from catalogue_rows')) as { rows: { galaxy: number }[] }
      const plan = await computeRevision(trx, { revision: (await currentRevision(trx)) + 1, touched: rows.map((r) => r.galaxy) })
      expect(plan.rows).toEqual([])
      expect(plan.adopted).toEqual([])
      expect(effectOf(plan)).toEqual({ galaxies: [], systems: [], shifts: [], counts: { galaxiesAdded: 0, galaxiesChanged: 0, distancesMoved: 0, hostsChanged: 0 } })
    })
  })

  it('counts the members that systems gain and lose', async () => {
    const { knex } = database()
    const members = async (): Promise<Map<string, number>> => {
      const { rows } = (await knex.raw('select host, count(*)::int as n from catalogue_rows where rev_to is null and host is not null group by host')) as { rows: { host: string; n: number }[] }
      return new Map(rows.map((r) => [r.host, r.n]))
    }
    const draw = random(21)
    let moved = 0
    for (let step = 0; step < 20; step++) {
      const before = await members()
      const plan = await approve(knex, draw, draw.pick([addGalaxy, replaceMeasurement, addMeasurement]))
      const after = await members()
      const effect = effectOf(plan)
      for (const system of effect.systems) {
        moved++
        expect([system.slug, system.before, system.after]).toEqual([system.slug, before.get(system.slug) ?? 0, after.get(system.slug) ?? 0])
      }
      const named = new Set(effect.systems.map((s) => s.slug))
      for (const [host, n] of after) if (!named.has(host)) expect([host, n]).toEqual([host, before.get(host)])
    }
    expect(moved).toBeGreaterThan(0)
  })
})

describe('the neighbourhood in memory', () => {
  it('is not touched by a preview that is rolled back', async () => {
    const { knex } = database()
    const draw = random(31)
    for (let step = 0; step < 5; step++) {
      await undone(knex, async (trx) => void (await propose(trx, draw, draw.pick([addGalaxy, amendGalaxy, replaceMeasurement]))))
      await approve(knex, draw, addMeasurement)
    }
    await expectAsRebuilt(knex)
  })

  it('follows what another process has approved', async () => {
    const { knex, url } = database()
    const other = openDatabase({ databaseUrl: url })
    try {
      const draw = random(41)
      for (let step = 0; step < 12; step++) await approve(step % 3 === 0 ? knex : other, draw, draw.pick(ANY))
      await approve(knex, draw, addMeasurement)
      await expectAsRebuilt(knex)
    } finally {
      await other.destroy()
    }
  })

  it('forgets a revision that was rolled back when another gets its number', async () => {
    const { knex } = database()
    const draw = random(51)
    await undone(knex, async (trx) => {
      for (let i = 0; i < 3; i++) {
        const plan = await propose(trx, draw, draw.pick([addGalaxy, amendGalaxy]))
        await writeRevision(trx, plan)
        await trx('revisions').insert({ number: plan.revision, summary: 'Never came about' })
      }
    })
    for (let i = 0; i < 4; i++) await approve(knex, draw, draw.pick([replaceMeasurement, addGalaxy]))
    await expectAsRebuilt(knex)
  })
})

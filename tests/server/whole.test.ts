/** The whole catalogue computed anew: the same from one thread or several, written or foreseen. */
import type { Knex } from 'knex'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Scale } from '../../core/adoption/adopted.ts'
import { COLUMNS } from '../../core/columns.ts'
import type { CatalogueEffect } from '../../core/effect.ts'
import { random } from '../../core/random.ts'
import { galaxiesAcrossTheSky, loadScale } from '../../server/services/revision/load.ts'
import { rebuildCatalogue } from '../../server/services/revision/rebuild.ts'
import { recompute, type Progress } from '../../server/services/revision/whole/recompute.ts'
import { withSharers } from '../../server/services/revision/whole/threads.ts'
import { useTestDatabase } from './harness/database.ts'
import { addGalaxy, approve, laySources, setHost, setOverride } from './revision/shifting.ts'

const database = useTestDatabase()

const withAnchorMoved = (scale: Scale, by: number): Scale => ({ ...scale, anchors: scale.anchors.map((a) => (a.key === 'trgb-absolute-i' ? { ...a, value: a.value + by } : a)) })

/** @param threads - 0 keeps it in this thread */
function foresee(knex: Knex, threads: number, by: number, onProgress?: (progress: Progress) => void): Promise<CatalogueEffect> {
  return knex.transaction(
    async (trx) => {
      const scale = withAnchorMoved(await loadScale(trx), by)
      const ids = await galaxiesAcrossTheSky(trx)
      return withSharers(trx, { databaseUrl: database().url, threads, enough: 1 }, async (sharers) => {
        expect(sharers.length).toBe(Math.max(1, threads))
        return (await recompute(sharers, { scale, ids, onProgress })).effect
      })
    },
    { isolationLevel: 'repeatable read', readOnly: true },
  )
}

beforeAll(async () => {
  const { knex } = database()
  await laySources(knex)
  const draw = random(8)
  for (let i = 0; i < 60; i++) await approve(knex, draw, addGalaxy)
  for (const change of [setHost, setHost, setOverride, setOverride]) await approve(knex, draw, change)
})

describe('computing the whole catalogue', () => {
  it('foresees nothing where nothing differs', async () => {
    expect(await foresee(database().knex, 0, 0)).toEqual({ galaxies: [], systems: [], shifts: [], counts: { galaxiesAdded: 0, galaxiesChanged: 0, distancesMoved: 0, hostsChanged: 0 } })
  })

  it('gives the same whatever the number of threads', async () => {
    const { knex } = database()
    const inOne = await foresee(knex, 0, 0.07)
    expect(inOne.counts.distancesMoved).toBeGreaterThan(20)
    expect(inOne.counts.galaxiesChanged).toBeGreaterThanOrEqual(inOne.counts.distancesMoved)
    for (const threads of [1, 2, 3]) expect(await foresee(knex, threads, 0.07)).toEqual(inOne)
  }, 60_000)

  it('tells how far it is, rising to the end, in words', async () => {
    const told: Progress[] = []
    await foresee(database().knex, 2, 0.01, (progress) => told.push(progress))
    expect(told.at(-1)?.done).toBe(1)
    expect(told.map((p) => p.done)).toEqual([...told].map((p) => p.done).sort((a, b) => a - b))
    expect([...new Set(told.map((p) => p.step))]).toEqual(['Adopting values', 'Looking for hosts', 'Comparing with what stands'])
  }, 30_000)

  it('writes what it foresaw, to the last digit, in threads as in the transaction itself', async () => {
    const { knex } = database()
    const foreseen = await foresee(knex, 2, -0.05)
    const before = await printed(knex)
    await knex.raw("update anchors set value = value - 0.05 where key = 'trgb-absolute-i' and rev_to is null")
    const rowsAfter = async (threads: number): Promise<Map<string, Record<string, unknown>>> => {
      let after = new Map<string, Record<string, unknown>>()
      await expect(
        knex.transaction(async (trx) => {
          const { rows } = (await trx.raw('select max(number) + 1 as next from revisions')) as { rows: { next: number }[] }
          const revision = rows[0]?.next ?? 0
          await withSharers(trx, { databaseUrl: database().url, threads, enough: 1 }, (sharers) => rebuildCatalogue(trx, revision, { sharers }))
          after = await printed(trx)
          throw new Error('undone')
        }),
      ).rejects.toThrow('undone')
      return after
    }
    const after = await rowsAfter(2)
    expect(await rowsAfter(0)).toEqual(after)
    for (const { slug, changes } of foreseen.galaxies) {
      for (const c of changes) expect([slug, c.column, before.get(slug)?.[c.column] ?? null, after.get(slug)?.[c.column] ?? null]).toEqual([slug, c.column, c.before, c.after])
    }
    // Whoever is not told of has not moved, at the precision that is printed.
    const told = new Set(foreseen.galaxies.map((g) => g.slug))
    const decimals = new Map(COLUMNS.map((c) => [c.key, c.decimals]))
    for (const [slug, row] of after) {
      if (told.has(slug)) continue
      for (const key of ['dm', 'distance', 'abs_v', 'host_sep', 'host_probability']) {
        const print = (value: unknown): unknown => (typeof value === 'number' ? value.toFixed(decimals.get(key)) : value)
        expect([slug, key, print(row[key])]).toEqual([slug, key, print(before.get(slug)?.[key])])
      }
    }
    await knex.raw("update anchors set value = value + 0.05 where key = 'trgb-absolute-i' and rev_to is null")
  }, 60_000)

  it('says why a thread could not do its work', async () => {
    const { knex } = database()
    await expect(
      knex.transaction(
        async (trx) => {
          const scale = await loadScale(trx)
          return withSharers(trx, { databaseUrl: database().url.replace(/\/[^/]*$/, '/nowhere'), threads: 2, enough: 1 }, (sharers) => recompute(sharers, { scale, ids: [1, 2] }))
        },
        { isolationLevel: 'repeatable read', readOnly: true },
      ),
    ).rejects.toThrow(/nowhere|does not exist/)
  }, 30_000)
})

async function printed(knex: Knex): Promise<Map<string, Record<string, unknown>>> {
  const { rows } = (await knex.raw('select * from catalogue_rows where rev_to is null')) as { rows: (Record<string, unknown> & { slug: string })[] }
  // Of a version, not of what it says.
  return new Map(rows.map(({ id: _, updated_at: __, ...row }) => [row.slug as string, row]))
}

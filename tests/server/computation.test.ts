import { beforeAll, describe, expect, it } from 'vitest'
import { COMPUTATION_VERSION } from '../../core/computation.ts'
import { random } from '../../core/random.ts'
import { recomputeWhenOlder } from '../../server/maintenance/recompute.ts'
import { useTestDatabase } from './harness/database.ts'
import { addGalaxy, approve, currentRevision, laySources } from './revision/shifting.ts'

const database = useTestDatabase()
const renew = (said: string[] = []): Promise<number | null> => recomputeWhenOlder(database().knex, { databaseUrl: database().url, computeThreads: 2 }, (sentence) => said.push(sentence))

beforeAll(async () => {
  const { knex } = database()
  expect(await renew()).toBe(null)
  await laySources(knex)
  const draw = random(5)
  for (let i = 0; i < 12; i++) await approve(knex, draw, addGalaxy)
})

/** As an older computation would have left it. */
async function age(spoil: boolean): Promise<void> {
  const { knex } = database()
  await knex.raw('update computations set version = version - 1')
  if (spoil) await knex.raw("update catalogue_rows set host_sep_median = null, host_sep = host_sep + 1 where rev_to is null and host_sep is not null")
}

describe('a catalogue that an older computation made', () => {
  it('is computed anew as a revision of its own, and past revisions stay as they were', async () => {
    const { knex } = database()
    const before = await currentRevision(knex)
    await age(true)
    const said: string[] = []
    expect(await renew(said)).toBe(before + 1)
    expect(said[0]).toMatch(/computation has changed/)
    expect(await currentRevision(knex)).toBe(before + 1)
    const rows = (await knex('catalogueRows').whereNotNull('hostSep').orderBy(['galaxy', 'revFrom']).select('galaxy', 'hostSep', 'hostSepMedian', 'revFrom', 'revTo')) as { hostSep: number; hostSepMedian: number | null; revFrom: number; revTo: number | null }[]
    expect(rows.filter((r) => r.revTo === null && r.hostSepMedian === null)).toEqual([])
    expect(rows.some((r) => r.revTo === before + 1 && r.hostSepMedian === null)).toBe(true)
    expect(await knex('computations').where({ version: COMPUTATION_VERSION }).first('revision')).toEqual({ revision: before + 1 })
  }, 30_000)

  it('makes no revision when the values are the same', async () => {
    const { knex } = database()
    await knex.raw('delete from computations')
    const before = await currentRevision(knex)
    expect(await renew()).toBe(null)
    expect(await currentRevision(knex)).toBe(before)
    expect(await renew()).toBe(null)
  })

  it('is renewed once when two start at the same time', async () => {
    const { knex } = database()
    await knex.raw('delete from computations')
    await age(true)
    const before = await currentRevision(knex)
    expect((await Promise.all([renew(), renew()])).sort()).toEqual([before + 1, null].sort())
  }, 30_000)
})

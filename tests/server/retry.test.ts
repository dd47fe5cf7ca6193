import { describe, expect, it } from 'vitest'
import { retrying } from '../../server/services/review/retry.ts'
import { useTestDatabase } from './harness/database.ts'

const database = useTestDatabase()

describe('a transaction that lost a race', () => {
  it('is done again when two deadlock, so that both come through', async () => {
    const { knex } = database()
    await knex.raw('CREATE TABLE races (id integer PRIMARY KEY, wins integer NOT NULL)')
    await knex.raw('INSERT INTO races VALUES (1, 0), (2, 0)')
    let deadlocks = 0
    const swap = (first: number, second: number) =>
      retrying(async () => {
        try {
          await knex.transaction(async (trx) => {
            await trx.raw('UPDATE races SET wins = wins + 1 WHERE id = ?', [first])
            await new Promise((done) => setTimeout(done, 150))
            await trx.raw('UPDATE races SET wins = wins + 1 WHERE id = ?', [second])
          })
        } catch (error) {
          if (error instanceof Error && 'code' in error && error.code === '40P01') deadlocks += 1
          throw error
        }
      })
    await Promise.all([swap(1, 2), swap(2, 1)])
    expect(deadlocks).toBeGreaterThan(0)
    expect(await knex('races').orderBy('id')).toEqual([{ id: 1, wins: 2 }, { id: 2, wins: 2 }])
  })

  it('is not done again for any other error', async () => {
    let tries = 0
    await expect(
      retrying(async () => {
        tries += 1
        await database().knex.raw('SELECT 1 / 0')
      }),
    ).rejects.toThrow('division by zero')
    expect(tries).toBe(1)
  })

  it('gives up in the end', async () => {
    let tries = 0
    const failing = retrying(async () => {
      tries += 1
      throw Object.assign(new Error('could not serialize access'), { code: '40001' })
    })
    await expect(failing).rejects.toThrow('could not serialize')
    expect(tries).toBe(5)
  })
})

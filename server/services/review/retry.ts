/** Transactions that PostgreSQL asks to be done again. */
import { setTimeout as pause } from 'node:timers/promises'

/** serialization_failure, deadlock_detected */
const WORTH_AGAIN = new Set(['40001', '40P01'])
const TRIES = 5

/** Runs some work again, after a short and irregular pause, when it lost a race that another run will win. */
export async function retrying<T>(work: () => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await work()
    } catch (error) {
      const code = error instanceof Error && 'code' in error ? String(error.code) : ''
      if (attempt >= TRIES || !WORTH_AGAIN.has(code)) throw error
      await pause(20 * 2 ** attempt * (0.5 + Math.random()))
    }
  }
}

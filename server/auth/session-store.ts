/** Sessions in the table `sessions`. */
import connectPgSimple from 'connect-pg-simple'
import session, { type SessionData } from 'express-session'
import type { Pool } from 'pg'
import type { Logger } from 'pino'

/** A session in use is drawn out at most so often: not every reading needs a write. */
const TOUCH_EVERY_MS = 60_000
const MOST_REMEMBERED = 10_000

const Store = connectPgSimple(session)

/** connect-pg-simple, which draws a session out once a minute. What it remembers only saves work: another process may remember otherwise. */
class CalmStore extends Store {
  readonly #touched = new Map<string, number>()

  override touch(sid: string, data: SessionData, done?: () => void): void {
    const now = Date.now()
    if (now - (this.#touched.get(sid) ?? 0) < TOUCH_EVERY_MS) return done?.()
    if (this.#touched.size >= MOST_REMEMBERED) this.#touched.clear()
    this.#touched.set(sid, now)
    super.touch(sid, data, done)
  }
}

export function sessionStore(pool: Pool, log: Logger): session.Store {
  return new CalmStore({ pool, tableName: 'sessions', pruneSessionInterval: 15 * 60, errorLog: (...words: unknown[]) => log.warn({ words }, 'session store') })
}

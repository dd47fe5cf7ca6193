import { PlainError } from './plain-error.mjs'
import { ensureCluster } from './postgres/cluster.mjs'
import { clusterHome } from './place.mjs'
import { isAlive } from './postgres/postmaster.mjs'

const WATCH_EVERY_MS = 3_000

/**
 * Runs the site until it ends or a signal asks for its end; then stops what was started, the database last. A database that dies
 * meanwhile is started again: the server's pool finds it at the same port.
 * @param {import('./postgres/cluster.mjs').Cluster | null} cluster null for a database that is not ours to stop
 * @param {(whenStopping: (stop: () => Promise<void>) => void) => Promise<number>} begin starts everything and resolves with the server's exit status when it ends
 */
export async function superviseUntilStopped(cluster, begin) {
  /** @type {(() => Promise<void>)[]} */
  const stops = []
  let stopping = false
  let database = cluster
  const watch = setInterval(() => {
    if (stopping || !database || isAlive(database.pid)) return
    const lost = database
    database = null
    process.stderr.write('The database has ended by itself; starting it again.\n')
    void ensureCluster({ home: clusterHome() }).then(
      (again) => (database = again),
      (error) => {
        process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
        database = lost
      },
    )
  }, WATCH_EVERY_MS)

  const stopAll = async () => {
    stopping = true
    clearInterval(watch)
    for (const stop of stops) await stop()
    await database?.stop()
  }

  const asked = new Promise((/** @type {(value: 'asked') => void} */ resolve) => {
    for (const signal of /** @type {const} */ (['SIGTERM', 'SIGINT', 'SIGHUP'])) process.on(signal, () => resolve('asked'))
  })
  try {
    const ended = begin((stop) => stops.push(stop))
    const why = await Promise.race([asked, ended])
    if (why === 'asked') process.stdout.write('\nStopping.\n')
    else
      throw new PlainError(
        `The server ended by itself (status ${why}); its messages are above. The data are safe. Start it again with npm start.`,
      )
  } finally {
    await stopAll()
  }
  process.exit(0)
}

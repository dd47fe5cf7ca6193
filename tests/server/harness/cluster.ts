import pg from 'pg'

/** Every database of a test run begins with this and the run's process id, so that a later run can drop what a killed one left. */
const PREFIX = 'vicinage_test'

/** The process id of Vitest itself, in its workers too. */
function runId(): number {
  const told = Number(process.env.TEST_RUN_ID)
  if (told > 0) return told
  process.env.TEST_RUN_ID = String(process.pid)
  return process.pid
}

/** A name for a database of this run. */
export function databaseName(what: string): string {
  return `${PREFIX}_${runId()}_${what}`
}

/** Whether a database belongs to a run whose process is gone. */
export function isLeftover(name: string): boolean {
  const pid = Number(new RegExp(`^${PREFIX}_(\\d+)_`).exec(name)?.[1] ?? 0)
  if (pid === 0 || pid === process.pid) return false
  try {
    process.kill(pid, 0)
    return false
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'ESRCH'
  }
}

/** The test cluster's address without a database name. */
export function clusterBase(): string {
  const base = process.env.TEST_DATABASE_URL_BASE
  if (!base) throw new Error('The test cluster is not running: database tests belong to the Vitest projects "server" and "browser".')
  return base.replace(/\/+$/, '')
}

/** Runs statements that need no database of their own (create, drop). */
export async function administer<T>(work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: `${clusterBase()}/vicinage` })
  await client.connect()
  try {
    return await work(client)
  } finally {
    await client.end()
  }
}

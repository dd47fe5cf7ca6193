import { spawn } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { mkdirSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { PlainError } from '../plain-error.mjs'
import { requirePostgres } from './binaries.mjs'
import { canReach, databaseOwner } from './owner.mjs'
import { isAlive, pause, processesOf } from './postmaster.mjs'

/**
 * @typedef {object} Throwaway
 * @property {string} base address of the cluster without a database name; the role may create databases
 * @property {string} superuserUrl
 * @property {() => Promise<void>} stop ends the server and removes its folder
 */

/**
 * A new cluster for tests and benches. A keeper process holds it and ends it when this process ends, however this process ends:
 * the pipe between the two closes even on `kill -9`.
 * @param {{ durable?: boolean, settings?: string[] }} [options] durable switches fsync on
 * @returns {Promise<Throwaway>}
 */
export async function startThrowaway({ durable = false, settings = [] } = {}) {
  requirePostgres()
  const parent = throwawayParent()
  await removeAbandoned(parent)
  const home = join(parent, `vicinage-throwaway-${process.pid}-${randomBytes(4).toString('hex')}`)
  const keeper = spawn(
    process.execPath,
    [fileURLToPath(new URL('throwaway-keeper.mjs', import.meta.url)), JSON.stringify({ home, durable, settings })],
    {
      stdio: ['pipe', 'pipe', 'inherit'],
      detached: true,
      cwd: '/',
    },
  )
  const ended = new Promise((resolve) => keeper.once('exit', resolve))
  const line = await new Promise((resolve, reject) => {
    let text = ''
    keeper.stdout.setEncoding('utf8').on('data', (/** @type {string} */ part) => {
      text += part
      if (text.includes('\n')) resolve(text)
    })
    void ended.then(() => reject(new PlainError('The throwaway database did not start; the reason is above.')))
  })
  const { url, superuserUrl } = JSON.parse(line)
  // The keeper must not keep this process alive.
  keeper.unref()
  for (const pipe of [keeper.stdin, keeper.stdout]) /** @type {import('node:net').Socket} */ (/** @type {unknown} */ (pipe)).unref()
  return {
    base: url.replace(/\/[^/]*$/, ''),
    superuserUrl,
    stop: async () => {
      keeper.ref()
      keeper.stdin.end()
      await ended
    },
  }
}

/** A folder that the database's owner can enter: the temporary folder, mostly. */
function throwawayParent() {
  const owner = databaseOwner()
  const temporary = tmpdir()
  if (canReach(temporary, owner)) return temporary
  const fallback = '/var/lib/vicinage'
  mkdirSync(fallback, { recursive: true })
  return fallback
}

/** What is left when even a keeper was killed. @param {string} parent */
async function removeAbandoned(parent) {
  for (const entry of readdirSync(parent)) {
    const starter = /^vicinage-throwaway-(\d+)-/.exec(entry)?.[1]
    if (!starter || isAlive(Number(starter))) continue
    const home = join(parent, entry)
    try {
      for (const pid of processesOf(join(home, 'cluster'))) process.kill(pid, 'SIGQUIT')
      await pause(200)
      rmSync(home, { recursive: true, force: true, maxRetries: 5 })
    } catch {
      // another user's, or being removed by its own keeper
    }
  }
}

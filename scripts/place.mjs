import { createHash } from 'node:crypto'
import { join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { canReach, databaseOwner } from './postgres/owner.mjs'

/** The checkout. */
export const ROOT = fileURLToPath(new URL('..', import.meta.url)).replace(/\/$/, '')

/** What belongs to this checkout and is never committed: secrets, the database, notes of what runs. DATA_DIR names another folder. */
export const DATA = process.env.DATA_DIR ? resolve(process.env.DATA_DIR) : join(ROOT, '.data')

/**
 * Where this checkout's private cluster lives: in the checkout, or under /var/lib when the database's user cannot enter it (a
 * checkout in root's home folder, say).
 * @returns {string}
 */
export function clusterHome() {
  const home = join(DATA, 'postgres')
  if (process.getuid?.() !== 0 || canReach(home, databaseOwner())) return home
  const name = createHash('sha256').update(DATA).digest('hex').slice(0, 12)
  return join('/var/lib/vicinage', name, 'postgres')
}

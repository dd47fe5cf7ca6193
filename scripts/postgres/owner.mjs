import { spawnSync } from 'node:child_process'
import { chmodSync, chownSync, mkdirSync, readFileSync, statSync } from 'node:fs'
import { dirname } from 'node:path'
import { PlainError } from '../plain-error.mjs'

/**
 * Who runs the database: PostgreSQL refuses root, so as root its processes get the `postgres` user of Debian's package.
 * @typedef {{ uid: number, gid: number } | null} Owner null: this process's own user
 */

/** @returns {Owner} */
export function databaseOwner() {
  if (process.getuid?.() !== 0) return null
  const line =
    readFileSync('/etc/passwd', 'utf8')
      .split('\n')
      .find((entry) => /^postgres:/.test(entry)) ??
    readFileSync('/etc/passwd', 'utf8')
      .split('\n')
      .find((entry) => /^nobody:/.test(entry))
  const fields = line?.split(':')
  if (!fields)
    throw new PlainError(
      'The database may not run as root, and this machine has no "postgres" user to run it as. Start as an ordinary user, or set DATABASE_URL.',
    )
  return { uid: Number(fields[2]), gid: Number(fields[3]) }
}

/**
 * The user that an existing data folder belongs to: a cluster begun as root, or by somebody else, goes on as its owner.
 * @param {string} folder an existing data folder
 * @returns {Owner}
 */
export function ownerOf(folder) {
  const { uid, gid } = statSync(folder)
  const mine = process.getuid?.() ?? uid
  if (mine === uid) return null
  if (mine === 0) return { uid, gid }
  throw new PlainError(
    `The database folder ${folder} belongs to another user (uid ${uid}), probably because the first start was as root. It is untouched. Start as that user or as root again, or set DATABASE_URL to another database.`,
  )
}

/** Spawn options that make a child run as the owner. @param {Owner} owner */
export function asOwner(owner) {
  // The working folder of this process may be closed to the owner, hence '/'.
  return { cwd: '/', ...(owner ?? {}) }
}

/**
 * Makes a folder that belongs to the owner, reachable for the owner.
 * @param {string} folder
 * @param {Owner} owner
 */
export function makeOwnedFolder(folder, owner) {
  mkdirSync(folder, { recursive: true })
  if (owner) chownSync(folder, owner.uid, owner.gid)
  chmodSync(folder, 0o755)
}

/**
 * Whether the owner can enter the nearest existing folder at or above this one.
 * @param {string} folder
 * @param {Owner} owner
 * @returns {boolean}
 */
export function canReach(folder, owner) {
  if (!owner) return true
  let existing = folder
  while (!isFolder(existing)) existing = dirname(existing)
  return spawnSync('/bin/sh', ['-c', 'cd -- "$1"', 'sh', existing], asOwner(owner)).status === 0
}

/** @param {string} path */
function isFolder(path) {
  try {
    return statSync(path).isDirectory()
  } catch {
    return false
  }
}

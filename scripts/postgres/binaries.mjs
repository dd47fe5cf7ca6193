import { spawnSync } from 'node:child_process'
import { existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { installDebianPackages } from '../debian.mjs'
import { PlainError } from '../plain-error.mjs'

/** The oldest major version with trusted extensions, which let a role that is no superuser create cube and pg_trgm. */
const OLDEST_MAJOR = 13

/** @typedef {{ folder: string, major: number }} PostgresBinaries where `postgres` and `initdb` are, and their major version */

/**
 * The newest PostgreSQL server on this machine, or the one of the wanted major version.
 * @param {number} [wantedMajor] that of an existing data folder
 * @returns {PostgresBinaries | null}
 */
export function findPostgres(wantedMajor) {
  const found = candidateFolders()
    .filter((folder) => existsSync(join(folder, 'postgres')) && existsSync(join(folder, 'initdb')))
    .map((folder) => ({ folder, major: majorVersion(folder) }))
    .filter(({ major }) => (wantedMajor === undefined ? major >= OLDEST_MAJOR : major === wantedMajor))
    .sort((a, b) => b.major - a.major)
  return found[0] ?? null
}

/**
 * The server's binaries, installed from Debian's packages when missing and when we may.
 * @param {number} [wantedMajor]
 * @returns {PostgresBinaries}
 */
export function requirePostgres(wantedMajor) {
  const present = findPostgres(wantedMajor)
  if (present) return present
  if (process.getuid?.() === 0) keepDebianFromMakingACluster()
  installDebianPackages([wantedMajor === undefined ? 'postgresql' : `postgresql-${wantedMajor}`], "the catalogue's database")
  const installed = findPostgres(wantedMajor)
  if (installed) return installed
  throw new PlainError(
    `No usable PostgreSQL server was found (${wantedMajor === undefined ? `version ${OLDEST_MAJOR} or newer` : `version ${wantedMajor}, which made the data folder`}). Install one, or set DATABASE_URL to an existing server.`,
  )
}

/** @returns {string[]} */
function candidateFolders() {
  const debian = '/usr/lib/postgresql'
  const versions = existsSync(debian) ? readdirSync(debian).map((version) => join(debian, version, 'bin')) : []
  const path = (process.env.PATH ?? '').split(':').filter(Boolean)
  return [...versions, ...path, '/usr/local/pgsql/bin', '/opt/homebrew/opt/postgresql/bin']
}

/** @param {string} folder @returns {number} */
function majorVersion(folder) {
  const { stdout } = spawnSync(join(folder, 'postgres'), ['--version'], { encoding: 'utf8' })
  return Number(/(\d+)(\.|devel|beta|rc)/.exec(stdout ?? '')?.[1] ?? 0)
}

/** Debian's package would start a second cluster of its own on port 5432, which nobody asked for. */
function keepDebianFromMakingACluster() {
  const folder = '/etc/postgresql-common'
  const file = join(folder, 'createcluster.conf')
  if (existsSync(file)) return
  mkdirSync(folder, { recursive: true })
  writeFileSync(file, 'create_main_cluster = false\n')
}

import { spawnSync } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { PlainError } from './plain-error.mjs'
import { ROOT } from './place.mjs'

const OLDEST_NODE = /** @type {const} */ ([20, 19])

/** Refuses a Node.js that the packages do not run on. */
export function requireNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number)
  if (major > OLDEST_NODE[0] || (major === OLDEST_NODE[0] && minor >= OLDEST_NODE[1])) return
  throw new PlainError(
    `Node.js ${OLDEST_NODE.join('.')} or newer is needed, this is ${process.versions.node}. Nothing was changed; install a newer one and run this again.`,
  )
}

/** Installs the npm packages of the lock file unless they are all there. */
export function ensurePackages() {
  if (installedMatchLock()) return
  process.stdout.write('Installing npm packages\n')
  // The packages that build the client are "dev" ones, which NODE_ENV=production would leave out.
  const { status } = spawnSync('npm', ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'], {
    cwd: ROOT,
    stdio: ['ignore', 2, 2],
  })
  if (status !== 0)
    throw new PlainError(
      'npm could not install the packages; its messages are above. Nothing else was changed. Check the network and run this again.',
    )
}

/** @typedef {{ packages?: Record<string, { version?: string, optional?: boolean, link?: boolean }> }} Lock */

/**
 * npm writes what it has installed, last of all, to a lock file of the same form. Optional packages for other systems are absent.
 * @returns {boolean}
 */
function installedMatchLock() {
  const wanted = readLock(join(ROOT, 'package-lock.json'))
  const installed = readLock(join(ROOT, 'node_modules', '.package-lock.json'))?.packages
  if (!wanted || !installed) return false
  return Object.entries(wanted.packages ?? {}).every(([path, entry]) => {
    if (path === '' || entry.link) return true
    const present = installed[path]
    return present ? present.version === entry.version : entry.optional === true
  })
}

/** @param {string} file @returns {Lock | null} */
function readLock(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  } catch {
    return null
  }
}

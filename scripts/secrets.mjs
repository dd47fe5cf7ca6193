import { randomBytes, randomInt } from 'node:crypto'
import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { DATA } from './place.mjs'

/** @typedef {{ sessionSecret: string, demoPassword: string }} Secrets */

/**
 * The secrets of this checkout: from the environment, otherwise generated once and kept beside the database.
 * @returns {Secrets}
 */
export function checkoutSecrets() {
  const kept = readKept()
  return {
    sessionSecret: process.env.SESSION_SECRET || kept.sessionSecret,
    demoPassword: process.env.DEMO_PASSWORD || kept.demoPassword,
  }
}

/** @returns {Secrets} */
function readKept() {
  const file = join(DATA, 'secrets.json')
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'ENOENT') throw error
  }
  const made = { sessionSecret: randomBytes(48).toString('base64url'), demoPassword: readablePassword() }
  mkdirSync(DATA, { recursive: true })
  const fresh = `${file}.${process.pid}.new`
  writeFileSync(fresh, `${JSON.stringify(made, null, 2)}\n`, { mode: 0o600 })
  renameSync(fresh, file)
  return made
}

/** Four groups of four letters and digits without the ones that look alike: 79 bits, and can be typed from a screen. */
function readablePassword() {
  const letters = 'abcdefghjkmnpqrstuvwxyz23456789'
  const group = () => Array.from({ length: 4 }, () => letters[randomInt(letters.length)]).join('')
  return [group(), group(), group(), group()].join('-')
}

import { accessSync, constants, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { PlainError } from './plain-error.mjs'
import { DATA } from './place.mjs'
import { isAlive } from './postgres/postmaster.mjs'

const NOTE = join(DATA, 'running.json')

/**
 * Notes that this checkout is being served, so that a second start says so at once. A note whose process is gone counts for nothing.
 * @param {string} address
 * @returns {{ afterCrash: boolean }} whether such a note was found
 */
export function claimCheckout(address) {
  try {
    mkdirSync(DATA, { recursive: true })
    accessSync(DATA, constants.W_OK)
  } catch {
    throw new PlainError(
      `This user may not write to ${DATA}, where the database and its secrets are kept. Nothing was changed. Start as the user who owns this checkout.`,
    )
  }
  const note = JSON.stringify({ pid: process.pid, begun: begunAt(process.pid), address })
  for (let attempt = 0; attempt < 3; attempt += 1) {
    try {
      writeFileSync(NOTE, note, { flag: 'wx' })
      process.once('exit', () => rmSync(NOTE, { force: true }))
      return { afterCrash: attempt > 0 }
    } catch (error) {
      if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error
    }
    const other = readNote()
    if (other && isAlive(other.pid) && begunAt(other.pid) === other.begun) {
      throw new PlainError(
        `Vicinage is already running from this folder (process ${other.pid}) at ${other.address}. Nothing was changed. Use that one, or stop it first: kill ${other.pid}`,
      )
    }
    rmSync(NOTE, { force: true })
  }
  throw new PlainError('Another start of this checkout is under way. Nothing was changed; wait for it, or try again.')
}

/** @returns {{ pid: number, begun: string, address: string } | null} */
function readNote() {
  try {
    return JSON.parse(readFileSync(NOTE, 'utf8'))
  } catch {
    return null
  }
}

/**
 * When the process began, in clock ticks since the machine did: with it a pid names one process for good.
 * @param {number} pid
 */
function begunAt(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    // The program's name, in brackets, may hold spaces; the 22nd field of all is the 20th after it.
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] ?? ''
  } catch {
    return ''
  }
}

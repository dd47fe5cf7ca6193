import { readFileSync, readdirSync, readlinkSync, realpathSync } from 'node:fs'
import { connect, createServer } from 'node:net'
import { join } from 'node:path'

/**
 * What stands in a data folder's postmaster.pid, which may be left over from a server that was killed.
 * @typedef {{ pid: number, port: number, ready: boolean }} PidFile
 */

/** @param {string} dataFolder @returns {PidFile | null} */
export function readPidFile(dataFolder) {
  try {
    const lines = readFileSync(join(dataFolder, 'postmaster.pid'), 'utf8').split('\n')
    const pid = Number(lines[0])
    if (!Number.isInteger(pid) || pid <= 0) return null
    return { pid, port: Number(lines[3] ?? 0), ready: lines[7]?.trim() === 'ready' }
  } catch {
    return null
  }
}

/**
 * Whether the process is a server of this very data folder: a pid alone may by now belong to anybody.
 * A PostgreSQL process has its data folder as working folder.
 * @param {number} pid
 * @param {string} dataFolder
 */
export function servesFolder(pid, dataFolder) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === realpathSync(dataFolder)
  } catch {
    return false
  }
}

/**
 * Every process of this data folder, orphans of a killed server included.
 * @param {string} dataFolder
 * @returns {number[]}
 */
export function processesOf(dataFolder) {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
    .filter((pid) => servesFolder(pid, dataFolder))
}

/** @param {number} pid */
export function isAlive(pid) {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return /** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM'
  }
}

/**
 * Whether a PostgreSQL server answers at this loopback port: it is asked whether it speaks TLS, which needs no password.
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export function answersAt(port) {
  return new Promise((resolve) => {
    const socket = connect({ port, host: '127.0.0.1', timeout: 2_000 })
    const settle = (/** @type {boolean} */ answer) => {
      socket.destroy()
      resolve(answer)
    }
    // The SSLRequest message of the frontend/backend protocol: length 8, code 80877103; the answer is one letter.
    socket.once('connect', () => socket.write(Buffer.from([0, 0, 0, 8, 4, 210, 22, 47])))
    socket.once('data', (answer) => settle(/^[SN]/.test(answer.toString('latin1'))))
    socket
      .once('error', () => settle(false))
      .once('timeout', () => settle(false))
      .once('end', () => settle(false))
  })
}

/** @param {number} port @returns {Promise<boolean>} */
export function isFreePort(port) {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.once('error', () => resolve(false))
    probe.listen({ port, host: '127.0.0.1', exclusive: true }, () => probe.close(() => resolve(true)))
  })
}

/**
 * A free loopback port below the range that outgoing connections use, so that it is likely to be free next time too.
 * @returns {Promise<number>}
 */
export async function findFreePort() {
  for (let attempt = 0; attempt < 200; attempt += 1) {
    const port = 20_000 + Math.floor(Math.random() * 12_000)
    if (await isFreePort(port)) return port
  }
  throw new Error('no free port between 20000 and 32000 on 127.0.0.1')
}

/** @param {number} milliseconds */
export const pause = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds))

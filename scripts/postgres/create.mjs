import { spawnSync } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { chmodSync, chownSync, existsSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { basename, dirname, join } from 'node:path'
import { PlainError } from '../plain-error.mjs'
import { asOwner } from './owner.mjs'
import { isAlive } from './postmaster.mjs'

/**
 * How to get into a private cluster. Kept inside its data folder, so that the two cannot come apart.
 * @typedef {object} Access
 * @property {number} port kept from one start to the next
 * @property {string} superuserPassword of the role `postgres`
 * @property {string} password of the role `vicinage`, which owns the database `vicinage`
 */

const ACCESS_FILE = 'vicinage-access.json'

/** The application's role and database. The role is no superuser. */
export const ROLE = 'vicinage'

/** @param {string} dataFolder @returns {Access} */
export function readAccess(dataFolder) {
  return JSON.parse(readFileSync(join(dataFolder, ACCESS_FILE), 'utf8'))
}

/**
 * @param {string} dataFolder
 * @param {Access} access
 * @param {import('./owner.mjs').Owner} owner
 */
export function writeAccess(dataFolder, access, owner) {
  writePrivately(join(dataFolder, ACCESS_FILE), `${JSON.stringify(access, null, 2)}\n`, owner)
}

/**
 * Makes a cluster with the application's role and database in it. It is made under a temporary name and renamed once, whole:
 * a first start that is killed, or two at the same time, leave no half-made cluster.
 * @param {object} options
 * @param {string} options.dataFolder must not exist yet; its parent must, and belong to the owner
 * @param {import('./binaries.mjs').PostgresBinaries} options.binaries
 * @param {import('./owner.mjs').Owner} options.owner
 * @param {number} options.port
 * @param {boolean} [options.mayCreateDatabases] for tests and development
 * @param {boolean} [options.durable] false leaves out the fsyncs, for throwaway clusters
 */
export function createCluster({ dataFolder, binaries, owner, port, mayCreateDatabases = false, durable = true }) {
  const parent = dirname(dataFolder)
  removeAbandoned(parent, basename(dataFolder))
  const unfinished = join(parent, `${basename(dataFolder)}.unfinished-${process.pid}-${randomBytes(4).toString('hex')}`)
  const passwordFile = `${unfinished}.password`
  /** @type {Access} */
  const access = { port, superuserPassword: secret(), password: secret() }
  try {
    // initdb cannot read a password from Node's pipes (/dev/stdin), hence the short-lived file.
    writePrivately(passwordFile, `${access.superuserPassword}\n`, owner)
    runTool(
      join(binaries.folder, 'initdb'),
      [
        '-D',
        unfinished,
        '-U',
        'postgres',
        `--pwfile=${passwordFile}`,
        '-A',
        'scram-sha-256',
        '-E',
        'UTF8',
        '--locale=C.UTF-8',
        ...(durable ? [] : ['--no-sync']),
      ],
      owner,
    )
    // Single-user mode: role and database exist before anybody can connect.
    runTool(
      join(binaries.folder, 'postgres'),
      ['--single', '-D', unfinished, ...(durable ? [] : ['-F']), 'postgres'],
      owner,
      [
        `CREATE ROLE ${ROLE} LOGIN ${mayCreateDatabases ? 'CREATEDB' : 'NOCREATEDB'} PASSWORD '${access.password}'`,
        `CREATE DATABASE ${ROLE} OWNER ${ROLE}`,
        '',
      ].join('\n'),
    )
    writeAccess(unfinished, access, owner)
    try {
      renameSync(unfinished, dataFolder)
    } catch (error) {
      // Another start was faster: its cluster stands, ours is dropped.
      if (!existsSync(join(dataFolder, 'PG_VERSION'))) throw error
    }
  } finally {
    rmSync(passwordFile, { force: true })
    rmSync(unfinished, { recursive: true, force: true })
  }
}

const secret = () => randomBytes(24).toString('base64url')

/**
 * Written to a new file and renamed, so that a reader never sees half of it.
 * @param {string} file
 * @param {string} text
 * @param {import('./owner.mjs').Owner} owner
 */
function writePrivately(file, text, owner) {
  const fresh = `${file}.${process.pid}.new`
  writeFileSync(fresh, text, { mode: 0o600 })
  chmodSync(fresh, 0o600)
  if (owner) chownSync(fresh, owner.uid, owner.gid)
  renameSync(fresh, file)
}

/**
 * What a killed first start left behind.
 * @param {string} parent
 * @param {string} name
 */
function removeAbandoned(parent, name) {
  for (const entry of readdirSync(parent)) {
    const pid = new RegExp(`^${name}\\.unfinished-(\\d+)-`).exec(entry)?.[1]
    if (pid && !isAlive(Number(pid))) rmSync(join(parent, entry), { recursive: true, force: true })
  }
}

/**
 * @param {string} program
 * @param {string[]} words
 * @param {import('./owner.mjs').Owner} owner
 * @param {string} [input]
 */
function runTool(program, words, owner, input = '') {
  const done = spawnSync(program, words, { ...asOwner(owner), input, encoding: 'utf8', env: { PATH: process.env.PATH, LC_ALL: 'C.UTF-8' } })
  const messages = `${done.stderr ?? ''}${done.error?.message ?? ''}`
  // Single-user mode leaves with status 0 even when a statement failed.
  if (done.status === 0 && !/^.*\b(ERROR|FATAL|PANIC):/m.test(messages)) return
  throw new PlainError(
    `The database could not be set up: ${basename(program)} said "${messages.trim().split('\n').slice(-3).join(' ')}". Nothing was kept; mend the cause and start again.`,
  )
}

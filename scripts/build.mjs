import { spawnSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import { cpSync, existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { dirname, join, relative } from 'node:path'
import { PlainError } from './plain-error.mjs'
import { ROOT } from './place.mjs'

/**
 * @typedef {object} Part
 * @property {string} name
 * @property {string} output folder under dist/
 * @property {string[]} sources files and folders it is made from
 * @property {string[]} command
 * @property {string[]} copied folders whose other files (data, fonts) go along unchanged
 */

/** @type {Part} */
const client = {
  name: 'client',
  output: 'dist/client',
  sources: ['src', 'core', 'public', 'index.html', 'vite.config.ts', 'tsconfig.json', 'package-lock.json'],
  command: ['node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn'],
  copied: [],
}

/** @type {Part} */
const server = {
  name: 'server',
  output: 'dist/server',
  sources: ['server', 'core', 'migrations', 'seeds', 'tsconfig.json', 'tsconfig.server.json', 'package-lock.json'],
  // Types are checked by `npm test`; a start only needs the JavaScript.
  command: ['node_modules/typescript/bin/tsc', '-p', 'tsconfig.server.json', '--noCheck'],
  copied: ['server', 'core', 'migrations', 'seeds'],
}

/** Builds the client and the server, each only when its sources are not those of the last build. */
export function buildWhenStale() {
  for (const part of [client, server]) buildPart(part)
}

/** @param {Part} part */
function buildPart(part) {
  const output = join(ROOT, part.output)
  const stamp = join(ROOT, `${part.output}.stamp`)
  const digest = digestOf(part.sources)
  if (existsSync(output) && existsSync(stamp) && readFileSync(stamp, 'utf8') === digest) return
  process.stdout.write(`Building the ${part.name}\n`)
  rmSync(stamp, { force: true })
  rmSync(output, { recursive: true, force: true })
  const { status } = spawnSync(process.execPath, part.command, {
    cwd: ROOT,
    stdio: ['ignore', 2, 2],
    env: { ...process.env, NODE_ENV: 'production' },
  })
  if (status !== 0) throw new PlainError(`The ${part.name} could not be built; the reason is above. The database was not touched.`)
  for (const folder of part.copied) copyOtherFiles(folder, output)
  mkdirSync(dirname(stamp), { recursive: true })
  // Written last: a build that was killed is made again.
  writeFileSync(stamp, digest)
}

/** @param {string} folder @param {string} output */
function copyOtherFiles(folder, output) {
  for (const file of filesUnder(join(ROOT, folder))) {
    if (!/\.tsx?$/.test(file)) cpSync(file, join(output, relative(ROOT, file)), { preserveTimestamps: true })
  }
}

/**
 * Of names and contents: times say nothing after a checkout.
 * @param {string[]} sources
 */
function digestOf(sources) {
  const hash = createHash('sha256')
  for (const source of sources) {
    for (const file of filesUnder(join(ROOT, source)))
      hash
        .update(`${relative(ROOT, file)}\0`)
        .update(readFileSync(file))
        .update('\0')
  }
  return hash.digest('hex')
}

/** @param {string} path @returns {string[]} */
function filesUnder(path) {
  if (!existsSync(path)) return []
  if (!statSync(path).isDirectory()) return [path]
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesUnder(join(path, name)))
}

import { spawn } from 'node:child_process'
import { createServer } from 'node:net'
import { join } from 'node:path'
import { PlainError } from './plain-error.mjs'
import { ROOT, clusterHome } from './place.mjs'
import { pause } from './postgres/postmaster.mjs'
import { checkoutSecrets } from './secrets.mjs'

/** How long requests in flight may take to end when the server is told to stop. */
const STOP_LIMIT_MS = 15_000
/** How the preparation ends when it has printed a sentence about what is wrong. */
const EXPLAINED = 2
/** A server whose starter was killed needs a moment to notice and let go of the port. */
const PORT_PATIENCE_MS = 20_000

/**
 * Where to serve, from HOST and PORT.
 * @returns {{ host: string, port: number, address: string }}
 */
export function wantedAddress() {
  const host = process.env.HOST || '127.0.0.1'
  const port = Number(process.env.PORT || 4180)
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new PlainError(
      `PORT is "${process.env.PORT}", which is no port number. Nothing was started; set it to a whole number from 1 to 65535.`,
    )
  }
  const shown = host === '0.0.0.0' || host === '::' ? 'localhost' : host.includes(':') ? `[${host}]` : host
  return { host, port, address: `http://${shown}:${port}` }
}

/**
 * Refuses, before any long work, a port that cannot be listened on.
 * @param {string} host
 * @param {number} port
 * @param {boolean} afterCrash whether the last start of this checkout was killed, and its server may still be closing
 */
export async function requirePort(host, port, afterCrash) {
  const deadline = Date.now() + (afterCrash ? PORT_PATIENCE_MS : 0)
  for (;;) {
    const code = await tryToListen(host, port)
    if (code === null) return
    if (code === 'EADDRINUSE' && Date.now() < deadline) {
      await pause(250)
      continue
    }
    throw new PlainError(portSentence(code, host, port))
  }
}

/** @param {string} code @param {string} host @param {number} port */
function portSentence(code, host, port) {
  if (code === 'EADDRINUSE')
    return `Port ${port} is in use by another program. Nothing was started; stop that program or choose another port: PORT=${port + 1} npm start`
  if (code === 'EACCES')
    return `This user may not listen on port ${port}. Nothing was started; choose a port above 1023: PORT=4180 npm start`
  return `The server cannot listen on ${host}, port ${port} (${code}). Nothing was started; set HOST and PORT to an address of this machine.`
}

/** @param {string} host @param {number} port @returns {Promise<string | null>} the system's error code */
function tryToListen(host, port) {
  return new Promise((resolve) => {
    const probe = createServer()
    probe.once('error', (/** @type {NodeJS.ErrnoException} */ error) => resolve(error.code ?? error.message))
    probe.listen({ host, port }, () => probe.close(() => resolve(null)))
  })
}

/**
 * The database to use: the one DATABASE_URL names, otherwise this checkout's private cluster, started when it is not running.
 * @returns {Promise<{ url: string, cluster: import('./postgres/cluster.mjs').Cluster | null }>}
 */
export async function openDatabaseForCheckout() {
  if (process.env.DATABASE_URL) return { url: process.env.DATABASE_URL, cluster: null }
  const { requirePostgres } = await import('./postgres/binaries.mjs')
  const { ensureCluster } = await import('./postgres/cluster.mjs')
  // Debian's package makes the user that the cluster runs as, so it comes before the choice of the folder.
  requirePostgres()
  const cluster = await ensureCluster({ home: clusterHome() })
  return { url: cluster.url, cluster }
}

/**
 * The environment of the server and of the preparation before it.
 * @param {string} databaseUrl
 * @returns {NodeJS.ProcessEnv}
 */
export function serverEnvironment(databaseUrl) {
  const { sessionSecret, demoPassword } = checkoutSecrets()
  return {
    ...process.env,
    NODE_ENV: process.env.NODE_ENV || 'production',
    DATABASE_URL: databaseUrl,
    SESSION_SECRET: sessionSecret,
    DEMO_PASSWORD: demoPassword,
    UPLOADS_DIR: process.env.UPLOADS_DIR || join(ROOT, 'uploads'),
    // At a terminal the address should stay in sight; a log collector gets everything.
    LOG_LEVEL: process.env.LOG_LEVEL || (process.stdout.isTTY ? 'warn' : 'info'),
  }
}

/**
 * Migrates the database and fills an empty one.
 * @param {string[]} words of node: the program and its options
 * @param {NodeJS.ProcessEnv} environment
 * @param {(stop: () => Promise<void>) => void} [whenStopping]
 * @returns {Promise<{ migrated: string[], seeded: boolean, accounts: string[] }>}
 */
export async function prepareDatabase(words, environment, whenStopping) {
  const child = spawn(process.execPath, words, {
    cwd: ROOT,
    env: environment,
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  let said = ''
  child.stdout.setEncoding('utf8').on('data', (/** @type {string} */ part) => (said += part))
  const ended = new Promise((/** @type {(code: number) => void} */ resolve) => child.once('close', (code) => resolve(code ?? 1)))
  whenStopping?.(() => stopChild(child, ended))
  const status = await ended
  const line = said.trim().split('\n').at(-1)
  if (status === EXPLAINED) throw new PlainError('Nothing was started, and no data were changed.')
  if (status !== 0 || !line) {
    throw new PlainError(
      'The database could not be brought up to date; the reason is above. Each step either happened whole or not at all; mend the cause and start again.',
    )
  }
  return JSON.parse(line)
}

/**
 * Starts the server as a child that ends with this process.
 * @param {string[]} words of node
 * @param {NodeJS.ProcessEnv} environment
 */
export function spawnServer(words, environment) {
  const child = spawn(process.execPath, ['--import', join(ROOT, 'scripts/end-with-parent.mjs'), ...words], {
    cwd: ROOT,
    env: environment,
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    // Its own process group: Ctrl-C comes here first, and the server is then told once.
    detached: true,
  })
  return { child, ended: new Promise((/** @type {(code: number) => void} */ resolve) => child.once('exit', (code) => resolve(code ?? 1))) }
}

/**
 * Waits until the server answers.
 * @param {string} address
 * @param {Promise<number>} ended
 */
export async function untilAnswering(address, ended) {
  let gone = false
  void ended.then(() => (gone = true))
  const deadline = Date.now() + 60_000
  while (!gone && Date.now() < deadline) {
    const answered = await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(5_000) }).then(
      () => true,
      () => false,
    )
    if (answered) return
    await pause(100)
  }
  throw new PlainError(
    gone
      ? 'The server ended during its start; the reason is above. The data are safe.'
      : `The server did not answer at ${address} within a minute. The data are safe; look at its messages above.`,
  )
}

/**
 * Asks a child to end, and makes it after a while.
 * @param {import('node:child_process').ChildProcess} child
 * @param {Promise<number>} ended
 */
export async function stopChild(child, ended) {
  if (child.exitCode !== null || child.signalCode !== null) return
  child.kill('SIGTERM')
  const timer = setTimeout(() => child.kill('SIGKILL'), STOP_LIMIT_MS)
  await ended
  clearTimeout(timer)
}

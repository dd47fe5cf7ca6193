/** The server's entry: reads the configuration, opens the database, listens, and stops in good order. */
import { createServer } from 'node:http'
import type { Socket } from 'node:net'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { createApp } from './app.ts'
import { ConfigError, loadConfig, type Config } from './config.ts'
import { openDatabase } from './database.ts'
import { answerBrokenRequest } from './http/broken-request.ts'
import { serverLog } from './log.ts'
import { pendingMigrations } from './maintenance/migrate.ts'

const DRAIN_MS = 10_000

const config = configOrExit()
const log = serverLog(config)
const knex = openDatabase({ databaseUrl: config.databaseUrl })

const pending = await pendingMigrations(knex)
if (pending.length > 0) {
  process.stderr.write(`The server was not started: the database lacks ${pending.join(', ')}. Run npm start, which brings it up to date.\n`)
  await knex.destroy()
  process.exit(2)
}

const clientFolder = clientFolderOf(fileURLToPath(import.meta.url))
const app = createApp({ knex, config, log }, { clientFolder })
const server = createServer(app.express)
server.requestTimeout = 120_000
server.on('clientError', (error, socket) => answerBrokenRequest(error, socket as Socket))
server.listen(config.port, config.host, () => log.info({ address: config.publicUrl }, 'listening'))
server.on('error', (error) => {
  process.stderr.write(`The server cannot listen on ${config.host}:${config.port}: ${error.message}\n`)
  process.exitCode = 1
  void stop()
})

let stopping = false
async function stop(): Promise<void> {
  if (stopping) return
  stopping = true
  const timer = setTimeout(() => server.closeAllConnections(), DRAIN_MS)
  // Requests under way are answered; idle connections are let go.
  await new Promise<void>((resolve) => {
    server.close(() => resolve())
    server.closeIdleConnections()
  })
  clearTimeout(timer)
  await app.close()
  await knex.destroy()
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void stop())

/** A bad setting is said in one sentence, without a trace of calls that nobody asked for. */
function configOrExit(): Config {
  try {
    return loadConfig()
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error
    process.stderr.write(`${error.message}\n`)
    process.exit(1)
  }
}

/** dist/client, from dist/server/server/index.js as from server/index.ts. */
function clientFolderOf(entry: string): string {
  const compiled = entry.endsWith('.js')
  return join(entry, compiled ? '../../../client' : '../../dist/client')
}

/** The application in a process of its own, as in use: `DATABASE_URL=... tsx app-server.ts`, prints its port. */
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { pino } from 'pino'
import { createApp } from '../../server/app.ts'
import { loadConfig } from '../../server/config.ts'
import { openDatabase } from '../../server/database.ts'

const config = loadConfig({ ...process.env, SESSION_SECRET: 'x'.repeat(40), LOG_LEVEL: 'warn' })
const knex = openDatabase({ databaseUrl: config.databaseUrl, connections: 8 })
const unlimited = { most: 1e9, perSeconds: 60 }
const limits = { 'read': unlimited, 'write': unlimited, 'sign-in': unlimited, 'export': unlimited, 'upload': unlimited }
const app = createApp({ knex, config, log: pino({ level: 'warn' }) }, { limits })
const server = createServer(app.express)
server.listen(0, '127.0.0.1', () => process.stdout.write(`${(server.address() as AddressInfo).port}\n`))

/**
 * `npm run dev`: the same site with hot reload. Vite serves the client at PORT and hands /api to the server, which `tsx watch`
 * restarts when a file of it changes.
 */
import { join } from 'node:path'
import { ensurePackages, requireNode } from './packages.mjs'
import { run } from './plain-error.mjs'
import { ROOT } from './place.mjs'
import { findFreePort } from './postgres/postmaster.mjs'
import { claimCheckout } from './running.mjs'
import {
  openDatabaseForCheckout,
  prepareDatabase,
  requirePort,
  serverEnvironment,
  spawnServer,
  stopChild,
  untilAnswering,
  wantedAddress,
} from './service.mjs'
import { superviseUntilStopped } from './supervise.mjs'
import { greet } from './greet.mjs'

const TSX = join(ROOT, 'node_modules/tsx/dist/cli.mjs')
const VITE = join(ROOT, 'node_modules/vite/bin/vite.js')

run(async () => {
  requireNode()
  const { host, port, address } = wantedAddress()
  const { afterCrash } = claimCheckout(address)
  await requirePort(host, port, afterCrash)
  ensurePackages()
  const { url, cluster } = await openDatabaseForCheckout()
  await superviseUntilStopped(cluster, async (whenStopping) => {
    const apiPort = await findFreePort()
    /** @type {NodeJS.ProcessEnv} */
    const environment = {
      ...serverEnvironment(url),
      NODE_ENV: 'development',
      HOST: '127.0.0.1',
      PORT: String(apiPort),
      PUBLIC_URL: process.env.PUBLIC_URL || address,
    }
    const { accounts } = await prepareDatabase([TSX, 'server/maintenance/prepare.ts'], environment, whenStopping)
    const server = spawnServer([TSX, 'watch', '--clear-screen=false', 'server/index.ts'], environment)
    whenStopping(() => stopChild(server.child, server.ended))
    const vite = spawnServer([VITE, '--port', String(port), '--host', host, '--clearScreen', 'false', '--logLevel', 'warn'], {
      ...process.env,
      NODE_ENV: 'development',
      API_PORT: String(apiPort),
    })
    whenStopping(() => stopChild(vite.child, vite.ended))
    await untilAnswering(`http://127.0.0.1:${apiPort}`, server.ended)
    greet({ address, accounts, password: environment.DEMO_PASSWORD ?? '', cluster })
    return Promise.race([server.ended, vite.ended])
  })
})

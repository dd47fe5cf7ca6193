/**
 * `npm start`: from a fresh checkout to a running site. Installs and builds what is missing, starts the private database, brings
 * it up to date, fills it when empty, serves everything from one port and says where.
 */
import { ensurePackages, requireNode } from './packages.mjs'
import { run } from './plain-error.mjs'
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
import { buildWhenStale } from './build.mjs'
import { superviseUntilStopped } from './supervise.mjs'
import { greet } from './greet.mjs'

run(async () => {
  requireNode()
  const { host, port, address } = wantedAddress()
  const { afterCrash } = claimCheckout(address)
  await requirePort(host, port, afterCrash)
  ensurePackages()
  buildWhenStale()
  const { url, cluster } = await openDatabaseForCheckout()
  await superviseUntilStopped(cluster, async (whenStopping) => {
    const environment = serverEnvironment(url)
    const { accounts } = await prepareDatabase(
      ['--enable-source-maps', 'dist/server/server/maintenance/prepare.js'],
      environment,
      whenStopping,
    )
    const { child, ended } = spawnServer(['--enable-source-maps', 'dist/server/server/index.js'], environment)
    whenStopping(() => stopChild(child, ended))
    await untilAnswering(address, ended)
    greet({ address, accounts, password: environment.DEMO_PASSWORD ?? '', cluster })
    return ended
  })
})

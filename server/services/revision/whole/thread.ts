/** The body of a thread that computes a share: a connection of its own, with the view of the transaction that it works for. */
import { parentPort, workerData } from 'node:worker_threads'
import { openDatabase } from '../../../database.ts'
import type { Asked, Told, ThreadStart } from './messages.ts'
import { shareOf, type Outlet } from './share.ts'

const { databaseUrl, snapshot } = workerData as ThreadStart
const tell = (message: Told): void => parentPort?.postMessage(message)

const knex = openDatabase({ databaseUrl, purpose: 'upkeep', connections: 1 })
const reader = await knex.transaction({ isolationLevel: 'repeatable read', readOnly: true })
await reader.raw(`set transaction snapshot '${snapshot.replaceAll("'", "''")}'`)
const share = shareOf(reader)

let written: (() => void) | undefined
const outlet: Outlet = {
  batch: (batch) =>
    new Promise((resolve) => {
      written = resolve
      tell({ kind: 'batch', batch })
    }),
  progress: (done) => tell({ kind: 'progress', done }),
}

function carryOut(asked: Exclude<Asked, { step: 'written' }>): Promise<Extract<Told, { kind: 'result' }>['result']> {
  switch (asked.step) {
    case 'adopt':
      return share.adopt(asked.input, outlet)
    case 'place':
      return share.place(asked.input, outlet)
    case 'finish':
      return share.finish(asked.input, outlet)
  }
}

parentPort?.on('message', (asked: Asked) => {
  if (asked.step === 'written') return void written?.()
  carryOut(asked).then(
    (result) => tell({ kind: 'result', result }),
    (error: unknown) => tell({ kind: 'failed', error }),
  )
})

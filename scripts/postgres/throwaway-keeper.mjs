/**
 * Holds a throwaway cluster for throwaway.mjs: starts it, says where it is, and removes it when standard input closes, which is
 * when its starter has stopped it or has died.
 */
import { rmSync } from 'node:fs'
import { run } from '../plain-error.mjs'
import { ensureCluster } from './cluster.mjs'

run(async () => {
  const { home, durable, settings } = JSON.parse(process.argv[2] ?? '{}')
  let closed = false
  const close = new Promise((/** @type {(value: void) => void} */ resolve) => {
    const finish = () => {
      closed = true
      resolve()
    }
    process.stdin.resume().once('end', finish).once('close', finish)
    for (const signal of /** @type {const} */ (['SIGTERM', 'SIGINT', 'SIGHUP'])) process.on(signal, finish)
  })
  process.stdout.on('error', () => undefined)
  try {
    const cluster = await ensureCluster({ home, durable, mayCreateDatabases: true, settings: ['max_connections=200', ...settings] })
    if (!closed) process.stdout.write(`${JSON.stringify({ url: cluster.url, superuserUrl: cluster.superuserUrl })}\n`)
    await close
    await cluster.stop()
  } finally {
    rmSync(home, { recursive: true, force: true, maxRetries: 5 })
  }
})

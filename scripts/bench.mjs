/**
 * `npm run bench [-- name...]`: runs the programs of bench/ one after the other (or those named), each with a throwaway cluster
 * of its own whose address is in DATABASE_URL. The cluster is durable (fsync on), as in use; BENCH_DURABLE=false switches that off.
 * BENCH_DATABASE_URL names an existing database instead.
 */
import { spawn } from 'node:child_process'
import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { ensurePackages, requireNode } from './packages.mjs'
import { ROOT } from './place.mjs'
import { PlainError, run } from './plain-error.mjs'
import { startThrowaway } from './postgres/throwaway.mjs'

run(async () => {
  requireNode()
  ensurePackages()
  const wanted = process.argv.slice(2)
  const programs = readdirSync(join(ROOT, 'bench'))
    .filter((file) => file.endsWith('.ts') && (wanted.length === 0 || wanted.some((name) => file.includes(name))))
    .sort()
  if (programs.length === 0) throw new PlainError(`No bench is called ${wanted.join(', ') || 'anything.ts in bench/'}. Nothing was run.`)
  let failures = 0
  for (const program of programs) {
    process.stdout.write(`\n${program}\n`)
    failures += (await measure(program)) === 0 ? 0 : 1
  }
  if (failures > 0) throw new PlainError(`${failures} of ${programs.length} benches missed a bar or failed; see above.`)
})

/** @param {string} program @returns {Promise<number>} its exit status */
async function measure(program) {
  const given = process.env.BENCH_DATABASE_URL
  const cluster = given
    ? null
    : await startThrowaway({ durable: process.env.BENCH_DURABLE !== 'false', settings: ['max_wal_size=4GB', 'shared_buffers=1GB'] })
  try {
    return await new Promise((resolve, reject) => {
      const child = spawn(process.execPath, ['--import', 'tsx', join('bench', program)], {
        cwd: ROOT,
        stdio: ['ignore', 'inherit', 'inherit'],
        env: { ...process.env, NODE_ENV: 'production', DATABASE_URL: given ?? `${cluster?.base}/vicinage` },
      })
      child.once('error', reject).once('exit', (code) => resolve(code ?? 1))
    })
  } finally {
    await cluster?.stop()
  }
}

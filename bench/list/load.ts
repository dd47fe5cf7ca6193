/** Asking a server as fast as it answers, with wrk. */
import { execFile, spawnSync } from 'node:child_process'
import { promisify } from 'node:util'
import { installDebianPackages } from '../../scripts/debian.mjs'

export interface Load {
  perSecond: number
  /** Median and 99th percentile, ms. */
  p50: number
  p99: number
}

export function ensureWrk(): void {
  if (spawnSync('wrk', ['--version']).error) installDebianPackages(['wrk'], 'the benches')
}

/** @throws Error when any answer was not a good one */
export async function load(url: string, seconds: number, connections = 8): Promise<Load> {
  const { stdout } = await promisify(execFile)('wrk', ['-t1', `-c${connections}`, `-d${seconds}s`, '--latency', url])
  if (/Non-2xx|Socket errors/.test(stdout)) throw new Error(`${url} gave bad answers:\n${stdout}`)
  const number = (pattern: RegExp): string[] => pattern.exec(stdout)?.slice(1) ?? []
  const ms = (found: string[]): number => Number(found[0]) * (found[1] === 'us' ? 0.001 : found[1] === 's' ? 1000 : 1)
  return { perSecond: Number(number(/Requests\/sec:\s+([\d.]+)/)[0]), p50: ms(number(/50%\s+([\d.]+)(us|ms|s)/)), p99: ms(number(/99%\s+([\d.]+)(us|ms|s)/)) }
}

import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { installDebianPackages } from './debian.mjs'

/** The flags a headless Chromium wants on a server: no sandbox (it may run as root), no GPU, and nothing sent to anybody. */
export const CHROMIUM_FLAGS = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--enable-unsafe-swiftshader',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
]

/**
 * The browser to test with: CHROMIUM, or the first on the PATH.
 * @returns {string | null}
 */
export function findChromium() {
  if (process.env.CHROMIUM) return process.env.CHROMIUM
  const folders = [...(process.env.PATH ?? '').split(':').filter(Boolean), '/usr/bin']
  const programs = folders.flatMap((folder) => ['chromium', 'chromium-browser', 'google-chrome'].map((name) => join(folder, name)))
  return programs.find((program) => existsSync(program)) ?? null
}

/** @returns {string} */
export function requireChromium() {
  const present = findChromium()
  if (present) return present
  installDebianPackages(['chromium'], 'the browser tests')
  return findChromium() ?? '/usr/bin/chromium'
}

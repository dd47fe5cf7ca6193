import { spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { PlainError } from './plain-error.mjs'

/** Whether this process may install Debian packages. */
export function mayInstall() {
  return process.getuid?.() === 0 && existsSync('/usr/bin/apt-get')
}

/**
 * Installs Debian packages with apt-get. As anybody but root it throws one sentence that says what to install.
 * @param {string[]} packages
 * @param {string} purpose what they are needed for, the end of "... is needed for ..."
 */
export function installDebianPackages(packages, purpose) {
  const names = packages.join(' ')
  if (!mayInstall()) {
    throw new PlainError(
      `Missing for ${purpose}: ${names}. Nothing was changed; install with "sudo apt-get install ${names}" and run this again.`,
    )
  }
  process.stdout.write(`Installing ${names} from Debian's packages (for ${purpose})\n`)
  const options = ['-y', '-q', '-o', 'DPkg::Lock::Timeout=300', '-o', 'Dpkg::Options::=--force-confold']
  const install = () => apt(['install', ...options, '--no-install-recommends', ...packages])
  // Package lists may be missing or stale: the first failure refreshes them.
  if (install() || (apt(['update', ...options]), install())) return
  throw new PlainError(
    `apt-get could not install ${names}, needed for ${purpose}; its messages are above. Nothing else was changed: mend the package sources and run this again.`,
  )
}

/** @param {string[]} words @returns {boolean} whether it worked */
function apt(words) {
  const { status } = spawnSync('apt-get', words, {
    // apt is talkative: on standard error, so that what a script prints stays readable when piped.
    stdio: ['ignore', 2, 2],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  })
  return status === 0
}

/**
 * `npm test`: everything that is checked, from nothing. Installs what is missing, then lint, types and all tests, and ends with
 * Vitest's summary and the line `N passed, N failed`, in which lint and each type check count as one.
 */
import { spawn, spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { findChromium } from './chromium.mjs'
import { installDebianPackages } from './debian.mjs'
import { ensurePackages, requireNode } from './packages.mjs'
import { ROOT } from './place.mjs'
import { run } from './plain-error.mjs'
import { requirePostgres } from './postgres/binaries.mjs'

/** Programs the tests need, the Debian package of each, and how to see that it is there. */
const JUDGES = [
  { package: 'chromium', present: () => findChromium() !== null },
  { package: 'python3-astropy', present: () => works('/usr/bin/python3', ['-c', 'import astropy']) },
  { package: 'stilts', present: () => onPath('stilts') },
  { package: 'proj-bin', present: () => onPath('proj') },
  { package: 'poppler-utils', present: () => onPath('pdftotext') },
]

run(async () => {
  requireNode()
  ensurePackages()
  requirePostgres()
  const missing = JUDGES.filter((judge) => !judge.present()).map((judge) => judge.package)
  if (missing.length > 0) installDebianPackages(missing, 'the tests')

  const node = process.execPath
  const checks = [
    { name: 'lint', words: ['node_modules/eslint/bin/eslint.js', '.'] },
    { name: 'types', words: ['node_modules/typescript/bin/tsc', '-p', 'tsconfig.json'] },
    { name: 'types of the server as built', words: ['node_modules/typescript/bin/tsc', '-p', 'tsconfig.server.json', '--noEmit'] },
  ]
  let passed = 0
  let failed = 0
  for (const { name, words } of checks) {
    const begun = Date.now()
    const good = (await spawned(node, words)) === 0
    process.stdout.write(`${good ? 'passed' : 'FAILED'}: ${name} (${((Date.now() - begun) / 1000).toFixed(1)} s)\n`)
    if (good) passed += 1
    else failed += 1
  }

  const tests = await runVitest(process.argv.slice(2))
  passed += tests.passed
  failed += tests.failed
  process.stdout.write(`\n${passed} passed, ${failed} failed\n`)
  process.exitCode = failed === 0 ? 0 : 1
})

/**
 * @param {string[]} words further words for Vitest, a file to run say
 * @returns {Promise<{ passed: number, failed: number }>}
 */
async function runVitest(words) {
  const folder = mkdtempSync(join(tmpdir(), 'vicinage-tests-'))
  const report = join(folder, 'report.json')
  try {
    const status = await spawned(process.execPath, [
      'node_modules/vitest/vitest.mjs',
      'run',
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${report}`,
      ...words,
    ])
    const counts = readReport(report)
    // A file that cannot be loaded, an error outside any test, or a crash fails no test; it must fail the run.
    const failed = counts.failed === 0 && status !== 0 ? 1 : counts.failed
    return { passed: counts.passed, failed }
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

/**
 * @param {string} file
 * @returns {{ passed: number, failed: number }}
 */
function readReport(file) {
  try {
    const { numPassedTests, numFailedTests, testResults } = JSON.parse(readFileSync(file, 'utf8'))
    // A test file that failed without a failed test could not be loaded.
    const unloaded = testResults.filter(
      (/** @type {{ status: string, assertionResults: { status: string }[] }} */ result) =>
        result.status === 'failed' && !result.assertionResults.some((one) => one.status === 'failed'),
    ).length
    return { passed: numPassedTests, failed: numFailedTests + unloaded }
  } catch {
    return { passed: 0, failed: 0 }
  }
}

/**
 * @param {string} program
 * @param {string[]} words
 * @returns {Promise<number>} its exit status
 */
function spawned(program, words) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, words, { cwd: ROOT, stdio: ['ignore', 'inherit', 'inherit'] })
    child.once('error', reject).once('exit', (code) => resolve(code ?? 1))
  })
}

/** @param {string} program @param {string[]} words */
function works(program, words) {
  return spawnSync(program, words, { stdio: 'ignore' }).status === 0
}

/** @param {string} program */
function onPath(program) {
  return works('/bin/sh', ['-c', 'command -v "$1"', 'sh', program])
}

/**
 * An error whose message is a whole sentence for the person at the terminal: what happened, what is safe, what to do.
 * The scripts print the sentence alone; any other error is printed with its stack, because it is a fault of ours.
 */
export class PlainError extends Error {
  /** @param {string} sentence @param {ErrorOptions} [options] */
  constructor(sentence, options) {
    super(sentence, options)
    this.name = 'PlainError'
  }
}

/**
 * Runs a script's main function; prints what went wrong and leaves with status 1.
 * @param {() => Promise<void>} main
 */
export function run(main) {
  main().catch((/** @type {unknown} */ error) => {
    const text = error instanceof PlainError ? error.message : error instanceof Error ? error.stack : String(error)
    process.stderr.write(`\n${text}\n`)
    process.exit(1)
  })
}

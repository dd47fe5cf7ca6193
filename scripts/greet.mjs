/**
 * What a start prints last: the address, and who can sign in.
 * @param {{ address: string, accounts: readonly string[], password: string, cluster: unknown }} what
 */
export function greet({ address, accounts, password, cluster }) {
  const lines = [`Vicinage is running at ${address}`, '']
  if (accounts.length > 0) {
    lines.push('Demonstration accounts:', ...accounts.map((email) => `  ${email}`), `Password of each: ${password}`, '')
  }
  if (!cluster) lines.push('Using the database of DATABASE_URL.', '')
  lines.push('Ctrl-C stops it.')
  process.stdout.write(`\n${lines.join('\n')}\n`)
}

/** The known name that a mistyped one most likely means. */

/**
 * Edits (a letter put in, left out, changed, or swapped with the next) that turn one word into the other.
 *
 * @see Damerau 1964, Communications of the ACM 7, 171 (the restricted form: no letter is edited twice)
 */
export function editDistance(a: string, b: string): number {
  let before: number[] = []
  let above = Array.from({ length: b.length + 1 }, (_, j) => j)
  for (let i = 1; i <= a.length; i++) {
    const row = [i]
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1]
      let least = Math.min((above[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (above[j - 1] ?? 0) + (same ? 0 : 1))
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) least = Math.min(least, (before[j - 2] ?? 0) + 1)
      row.push(least)
    }
    before = above
    above = row
  }
  return above[b.length] ?? 0
}

/**
 * The nearest of the known names: the same but for case and punctuation, one that begins or ends with what was typed, or one within a few
 * edits. Undefined when nothing is near.
 */
export function nearestName(typed: string, known: readonly string[]): string | undefined {
  const wanted = plain(typed.slice(0, 60))
  if (wanted === '') return undefined
  const same = known.find((name) => plain(name) === wanted)
  if (same !== undefined) return same
  const scored = known.map((name) => ({ name, edits: editDistance(wanted, plain(name)) })).sort((a, b) => a.edits - b.edits)
  const best = scored[0]
  if (best && best.edits <= Math.max(1, Math.floor(Math.max(wanted.length, plain(best.name).length) / 3))) return best.name
  if (wanted.length < 3) return undefined
  const part = known.filter((name) => plain(name).startsWith(wanted) || plain(name).endsWith(wanted) || wanted.startsWith(plain(name)))
  return part.sort((a, b) => Math.abs(a.length - typed.length) - Math.abs(b.length - typed.length))[0]
}

function plain(name: string): string {
  return name.toLowerCase().replace(/[^a-z0-9]/g, '')
}

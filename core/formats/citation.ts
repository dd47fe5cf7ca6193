/** Reads a citation as tables write it: `Gieren+2005 ApJ 628 695`, `Jang & Lee 2014 ApJ 792 52`, `RC3`. */

export interface Citation {
  /** "Gieren et al. 2005" */
  label: string
  /** Family names as far as the citation gives them; "others" stands for those it leaves out. */
  authors: string[]
  year: number
  /** "ApJ 628 695"; empty when it names none. */
  venue: string
  kind: 'article' | 'catalogue' | 'thesis' | 'private'
}

/** Catalogues that are cited by an acronym alone, with the year of each. From memory. */
const ACRONYMS: readonly { name: RegExp; year: number }[] = [
  { name: /\bRC3\b/i, year: 1991 },
  { name: /\bRC2\b/i, year: 1976 },
  { name: /\bUGC\b/i, year: 1973 },
  { name: /\b2MASS\b/i, year: 2006 },
]

const YEAR = /(?<!\d)(1[6-9]\d\d|20\d\d|21\d\d)([a-z]?)(?!\d)/

/** @returns undefined when no year can be found in it */
export function readCitation(text: string): Citation | undefined {
  const words = text.replace(/\s+/g, ' ').trim()
  const year = YEAR.exec(words)
  if (!year) {
    const known = ACRONYMS.find((a) => a.name.test(words))
    return known ? { label: words, authors: [known.name.exec(words)?.[0] ?? words], year: known.year, venue: '', kind: 'catalogue' } : undefined
  }
  const ahead = words.slice(0, year.index).replace(/[\s,(]+$/, '')
  const before = ahead.replace(/[\s,+]+$/, '')
  const venue = words.slice(year.index + year[0].length).replace(/^[\s,.);:]+/, '').replace(/[\s,;]+$/, '')
  const kind = /priv(ate)?\.?\s*comm|in prep/i.test(words) ? 'private' : /thesis|dissertation|ph\.?\s?d/i.test(words) ? 'thesis' : 'article'
  if (before === '') return { label: words, authors: [words], year: Number(year[1]), venue, kind }
  const others = /(\+|et al\.?)$/i.test(ahead)
  const names = before
    .replace(/\s*(\+|et al\.?),?$/i, '')
    .split(/\s*(?:&|;|\band\b)\s*/i)
    .map((name) => name.replace(/[\s,]+$/, ''))
    .filter((name) => name !== '')
  const [first = before, second] = names
  const who = others || names.length > 2 ? `${familyName(first)} et al.` : second !== undefined ? `${familyName(first)} & ${familyName(second)}` : familyName(first)
  return { label: `${who} ${year[1]}${year[2]}`, authors: others ? [...names, 'others'] : names, year: Number(year[1]), venue, kind }
}

/** "Gieren, W." is "Gieren". */
function familyName(name: string): string {
  return name.split(',')[0] ?? name
}

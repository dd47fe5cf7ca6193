/**
 * Names of galaxies: the key under which any spelling of a designation is found, and the slug of its page.
 */

const LETTER_FORMS: Readonly<Record<string, string>> = { n: 'ngc', i: 'ic', u: 'ugc', e: 'eso', messier: 'm', andromeda: 'and' }

/**
 * The key of a name: accents, case, blanks, punctuation and leading zeros of numbers do not count, and the usual one-letter
 * short forms are written out, so `NGC224`, `ngc 0224` and `N 224` share the key `ngc224`.
 *
 * @returns lower-case letters and digits only; empty when the name holds none
 */
export function nameKey(name: string): string {
  const plain = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/\u2212/g, '-')
  const signed = plain.replace(/(\d)\s*\+\s*(?=\d)/g, '$1p').replace(/(\d)\s*-\s*(?=\d)/g, '$1m')
  const words = signed.match(/\p{L}+|\d+/gu) ?? []
  const head = words[0]
  if (head !== undefined && words.length === 2 && /^\d+$/.test(words[1] ?? '')) words[0] = LETTER_FORMS[head] ?? head
  return words.map((w) => (/^\d+$/.test(w) ? w.replace(/^0+(?=\d)/, '') : w)).join('')
}

/**
 * The slug of a designation, for URLs: `NGC 3109` is `ngc-3109`, `And XXIII` is `and-xxiii`.
 *
 * @returns lower-case letters, digits and single hyphens; `galaxy` when the designation holds none of these
 */
export function slugOf(designation: string): string {
  const slug = designation
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[’'ʼ]/g, '')
    .replace(/\+/g, '-p')
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
  return slug === '' ? 'galaxy' : slug
}

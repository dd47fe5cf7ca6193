/** Numbers as people type them: a true minus, blanks round them, an empty field for none. */

/** @returns the number, null for an empty field, NaN for what is no number */
export function typedNumber(text: string): number | null {
  const plain = text.trim().replace(/\u2212|–/g, '-')
  if (plain === '') return null
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain) ? Number(plain) : NaN
}

/** As it is typed into a field: empty for null. */
export function asTyped(value: number | null | undefined): string {
  return value == null ? '' : String(value)
}

/** A number in a sentence: with so many decimals, and a true minus sign. */
export function printed(value: number, decimals: number): string {
  return value.toFixed(decimals).replace('-', '\u2212')
}

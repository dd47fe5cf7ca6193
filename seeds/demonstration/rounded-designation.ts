/** A designation as it should not be made: `Demo J1142+2316` from a position that is rounded to minutes where it has to be truncated. */
export function roundedDesignation(acronym: string, ra: number, dec: number): string {
  const two = (n: number): string => String(n).padStart(2, '0')
  const time = Math.round((ra / 15) * 60)
  const arc = Math.round(Math.abs(dec) * 60)
  return `${acronym} J${two(Math.floor(time / 60) % 24)}${two(time % 60)}${dec < 0 ? '-' : '+'}${two(Math.floor(arc / 60))}${two(arc % 60)}`
}

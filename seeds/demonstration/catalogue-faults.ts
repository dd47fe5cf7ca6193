/** Slips that have got into the invented catalogue itself, for readers to come upon: they show in residuals and in tension, and nobody has mended them yet. */
import type { InventedSource } from './literature.ts'
import type { Invented } from './load.ts'

/** A whole paper on a zero point that nobody noticed, mag. */
export const ZERO_POINT = { title: 'A uniform red giant branch scale for nearby invented galaxies', off: 0.25 } as const
/** One tip of one galaxy that is its neighbour's, mag. */
export const OUTLIER_OFF = 0.9

/** @returns the same galaxies, with the slips; the galaxy with the outlying tip is the first that has two tips by other papers */
export function withFaults(invented: readonly Invented[], sources: readonly InventedSource[]): Invented[] {
  const wrong = sources.findIndex((s) => s.title === ZERO_POINT.title)
  const tips = (entry: Invented): number[] => entry.measurements.flatMap((m, i) => (m.method === 'trgb' && m.source !== wrong && m.anchorValueAssumed !== null ? [i] : []))
  const outlying = invented.findIndex((entry) => entry.galaxy.host !== null && tips(entry).length >= 2)
  return invented.map((entry, at) => {
    const slip = at === outlying ? tips(entry)[1] : undefined
    return {
      ...entry,
      measurements: entry.measurements.map((m, i) => {
        const off = (m.source === wrong ? ZERO_POINT.off : 0) + (i === slip ? OUTLIER_OFF : 0)
        return off === 0 || m.value === null ? m : { ...m, value: Number((m.value + off).toFixed(2)) }
      }),
    }
  })
}

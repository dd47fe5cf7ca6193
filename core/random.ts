/**
 * Seeded randomness: the same seed gives the same numbers on every machine, which results that people cite depend on.
 *
 * The generator is PCG-XSH-RR 64/32 (O'Neill 2014, "PCG: A family of simple fast space-efficient statistically good algorithms", Harvey Mudd
 * College HMC-CS-2014-0905), in two 32-bit halves since JavaScript's numbers hold 53 bits.
 */
export interface Random {
  /** Uniform in [0, 1). */
  uniform: () => number
  /** Normal with mean 0 and standard deviation 1. */
  normal: () => number
  /** Uniform whole number in [0, below). */
  integer: (below: number) => number
  /** One of a list that is not empty. */
  pick: <T>(list: readonly T[]) => T
}

/**
 * A generator of its own sequence.
 *
 * @param seed - whole number, 0 to 2³²−1
 * @param stream - sequences of one seed and different streams are independent; whole number, 0 to 2³²−1
 */
export function random(seed: number, stream = 0): Random {
  // state = state * 6364136223846793005 + increment, mod 2^64
  const incrementHigh = stream >>> 31
  const incrementLow = ((stream << 1) | 1) >>> 0
  let high = 0
  let low = 0

  const step = (): void => {
    const multiplierHigh = 0x5851f42d
    const multiplierLow = 0x4c957f2d
    const productLow = multiply(low, multiplierLow)
    const newHigh = (productLow.high + Math.imul(low, multiplierHigh) + Math.imul(high, multiplierLow)) >>> 0
    const sum = productLow.low + incrementLow
    low = sum >>> 0
    high = (newHigh + incrementHigh + (sum > 0xffffffff ? 1 : 0)) >>> 0
  }
  const next = (): number => {
    const oldHigh = high
    const oldLow = low
    step()
    // ((old >> 18) ^ old) >> 27, its low 32 bits; rotated right by old >> 59.
    const xorHigh = (oldHigh >>> 18) ^ oldHigh
    const xorLow = ((oldHigh << 14) | (oldLow >>> 18)) ^ oldLow
    const shifted = ((xorHigh << 5) | (xorLow >>> 27)) >>> 0
    const turn = oldHigh >>> 27
    return ((shifted >>> turn) | (shifted << (-turn & 31))) >>> 0
  }

  step()
  const seeded = low + (seed >>> 0)
  low = seeded >>> 0
  high = (high + (seeded > 0xffffffff ? 1 : 0)) >>> 0
  step()

  let spare: number | null = null
  const uniform = (): number => (next() * 2 ** 21 + (next() >>> 11)) / 2 ** 53
  const integer = (below: number): number => Math.floor(uniform() * below)
  return {
    uniform,
    integer,
    normal: () => {
      if (spare !== null) {
        const kept = spare
        spare = null
        return kept
      }
      // Marsaglia & Bray's polar method.
      for (;;) {
        const u = 2 * uniform() - 1
        const v = 2 * uniform() - 1
        const s = u * u + v * v
        if (s > 0 && s < 1) {
          const factor = Math.sqrt((-2 * Math.log(s)) / s)
          spare = v * factor
          return u * factor
        }
      }
    },
    pick: <T>(list: readonly T[]): T => {
      const item = list[integer(list.length)]
      if (item === undefined) throw new RangeError('nothing to pick from')
      return item
    },
  }
}

/** The 64-bit product of two unsigned 32-bit numbers. */
function multiply(a: number, b: number): { high: number; low: number } {
  const aLow = a & 0xffff
  const aHigh = a >>> 16
  const bLow = b & 0xffff
  const bHigh = b >>> 16
  const lowLow = aLow * bLow
  const middle = aHigh * bLow + (lowLow >>> 16)
  const middleLow = aLow * bHigh + (middle & 0xffff)
  return {
    high: (aHigh * bHigh + Math.floor(middle / 0x10000) + Math.floor(middleLow / 0x10000)) >>> 0,
    low: (((middleLow & 0xffff) << 16) | (lowLow & 0xffff)) >>> 0,
  }
}

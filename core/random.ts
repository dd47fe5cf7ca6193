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
  const incrementHigh = stream >>> 31
  const incrementLow = (stream << 1) | 1
  // The two halves of the state, as signed 32-bit numbers: those are computed with fastest.
  const state = new Int32Array(2)

  /** state = state * 6364136223846793005 + increment, mod 2^64 */
  const step = (): void => {
    const high = state[0] ?? 0
    const low = state[1] ?? 0
    // The upper half of low * 0x4c957f2d, in 16-bit digits.
    const a0 = low & 0xffff
    const a1 = low >>> 16
    const middle = a1 * 0x7f2d + ((a0 * 0x7f2d) >>> 16)
    const carried = a1 * 0x4c95 + (middle >>> 16) + ((a0 * 0x4c95 + (middle & 0xffff)) >>> 16)
    const productLow = Math.imul(low, 0x4c957f2d)
    const newLow = (productLow + incrementLow) | 0
    const carry = newLow >>> 0 < productLow >>> 0 ? 1 : 0
    state[0] = carried + Math.imul(low, 0x5851f42d) + Math.imul(high, 0x4c957f2d) + incrementHigh + carry
    state[1] = newLow
  }
  const next = (): number => {
    const oldHigh = state[0] ?? 0
    const oldLow = state[1] ?? 0
    step()
    // ((old >> 18) ^ old) >> 27, its low 32 bits; rotated right by old >> 59.
    const xorHigh = (oldHigh >>> 18) ^ oldHigh
    const xorLow = ((oldHigh << 14) | (oldLow >>> 18)) ^ oldLow
    const shifted = (xorHigh << 5) | (xorLow >>> 27)
    const turn = oldHigh >>> 27
    return ((shifted >>> turn) | (shifted << (-turn & 31))) >>> 0
  }

  step()
  const seeded = (state[1] ?? 0) + (seed | 0)
  if (seeded >>> 0 < seed >>> 0) state[0] = (state[0] ?? 0) + 1
  state[1] = seeded
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

/**
 * Many normals at once, of a sequence of their own: several times as fast as asking one after the other.
 *
 * The generator is that of `random`, its 32-bit numbers used as they come, by Marsaglia & Bray's polar method.
 *
 * @param seed, stream - as for `random`
 * @returns normals with mean 0 and standard deviation 1
 */
export function normals(seed: number, stream: number, count: number): Float64Array {
  const list = new Float64Array(count)
  const incrementHigh = stream >>> 31
  const incrementLow = (stream << 1) | 1
  let high = 0
  let low = 0
  let first = 0
  // Two steps seed the generator, as in `random`; from then on each pair of steps gives a point of the square.
  for (let steps = -2, filled = 0; filled < count; steps++) {
    const oldHigh = high
    const oldLow = low
    const a0 = low & 0xffff
    const a1 = low >>> 16
    const middle = a1 * 0x7f2d + ((a0 * 0x7f2d) >>> 16)
    const carried = a1 * 0x4c95 + (middle >>> 16) + ((a0 * 0x4c95 + (middle & 0xffff)) >>> 16)
    const productLow = Math.imul(low, 0x4c957f2d)
    low = (productLow + incrementLow) | 0
    high = (carried + Math.imul(oldLow, 0x5851f42d) + Math.imul(high, 0x4c957f2d) + incrementHigh + (low >>> 0 < productLow >>> 0 ? 1 : 0)) | 0
    if (steps === -2) {
      const seeded = (low + (seed | 0)) | 0
      if (seeded >>> 0 < seed >>> 0) high = (high + 1) | 0
      low = seeded
    }
    if (steps < 0) continue
    const xorHigh = (oldHigh >>> 18) ^ oldHigh
    const xorLow = ((oldHigh << 14) | (oldLow >>> 18)) ^ oldLow
    const shifted = (xorHigh << 5) | (xorLow >>> 27)
    const turn = oldHigh >>> 27
    const number = (shifted >>> turn) | (shifted << (-turn & 31))
    if ((steps & 1) === 0) {
      first = number
      continue
    }
    const u = first / 2 ** 31
    const v = number / 2 ** 31
    const s = u * u + v * v
    if (s <= 0 || s >= 1) continue
    const factor = Math.sqrt((-2 * Math.log(s)) / s)
    list[filled++] = u * factor
    if (filled < count) list[filled++] = v * factor
  }
  return list
}

/**
 * The records that the science works on, as plain values: no identifiers of the database's making but the numbers that name them.
 */
import type { GalaxyClass, GalaxyStatus } from '../classes.ts'
import type { MethodKey } from '../methods.ts'
import type { PublishedValue, QuantityKey, ReddeningConvention } from '../quantities.ts'

/** One physical object, as it holds at one revision. Angles in degrees, ICRS. */
export interface Galaxy {
  id: number
  /** The version that holds: a conflict check compares it with the one a change was made from. */
  versionId: number
  slug: string
  designation: string
  status: GalaxyStatus
  class: GalaxyClass
  ra: number
  dec: number
  note: string | null
}

/** One published value of one quantity of one galaxy, in the quantity's canonical unit. */
export interface Measurement {
  /** Names the measurement through all its versions. */
  id: number
  versionId: number
  galaxyId: number
  quantity: QuantityKey
  /** null for a text quantity. */
  value: number | null
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  textValue: string | null
  /** An upper limit says "no more than", a lower one "no less than". */
  limitFlag: 'upper' | 'lower' | null
  method: MethodKey | null
  /** Key of the anchor it hangs on, and the value of it that the authors assumed. */
  anchor: string | null
  anchorValueAssumed: number | null
  convention: ReddeningConvention | null
  published: PublishedValue | null
  sourceId: number
  /** Short citation, for sentences: "Gieren et al. 2005". */
  sourceLabel: string
  sourceYear: number
  locator: string | null
  note: string | null
  excludedReason: string | null
  /** The measurement (id) that this one replaces as the same team's newer word. */
  supersedes: number | null
}

/** A reference value that a distance method hangs on. */
export interface Anchor {
  key: string
  label: string
  /**
   * `modulus`: a distance modulus, so that μ moves with it; `absolute-magnitude`: the luminosity of a standard candle, so that μ = m − M
   * moves against it.
   */
  kind: 'modulus' | 'absolute-magnitude'
  methods: readonly MethodKey[]
  /** mag */
  value: number
  /** mag */
  err: number
  source: string
}

/** What somebody decided against the policy, and why. */
export interface Override {
  galaxyId: number
  quantity: QuantityKey | 'host'
  /** Measurements to adopt (ids), or the slug of the host (null: none). */
  choice: { measurements: readonly number[] } | { host: string | null }
  reason: string
}

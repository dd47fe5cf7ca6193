/** What adoption gives, and what it works from. */
import type { Anchor } from '../catalogue/types.ts'
import type { MethodKey } from '../methods.ts'
import type { QuantityKey } from '../quantities.ts'
import type { Policy } from '../scale/policy.ts'

/** The set of adopted anchors and the policy. */
export interface Scale {
  anchors: readonly Anchor[]
  policy: Policy
}

/** How one measurement entered the adopted value. */
export interface Reason {
  measurementId: number
  used: boolean
  /** Share of the adopted value, 0 to 1; the shares sum to 1. */
  weight: number
  /** What the scale added to the published value. */
  shift: number
  /** On the catalogue's scale; null for a text. */
  scaled: number | null
  /** The error that entered. */
  error: number | null
  /** (scaled − adopted) / error. */
  residual: number | null
  tension: boolean
  reason: string
  flags: string[]
}

export interface Adopted {
  quantity: QuantityKey
  value: number | null
  textValue: string | null
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  nUsed: number
  nAll: number
  chi2: number | null
  dof: number | null
  scatter: number | null
  /** Distances only: the method with the largest share. */
  method: MethodKey | null
  sentence: string
  reasons: Reason[]
  override: string | null
}

/** What an override chose, already looked up. */
export interface Chosen {
  measurements: readonly number[]
  reason: string
}

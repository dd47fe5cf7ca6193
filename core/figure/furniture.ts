/** What stands around a map comes in blocks: marks from a corner downward, and how high they are, mm. */
import type { GroupMark } from './scene.ts'

export interface Block {
  group: GroupMark
  /** mm */
  height: number
}

export interface BlockPlace {
  x: number
  y: number
  /** mm */
  width: number
}

/** What only the caller knows of the data shown. */
export interface FigureContext {
  /** Label of the release, or the revision in words. */
  releaseLabel: string
  /** Galaxies drawn, and how many the filter lets through. */
  count: number
  of: number
}

export interface SceneOptions {
  /** The map alone, for a page that sets title, legend and credit itself. */
  bare?: boolean
  /** Label of the release that is shown, or the revision in words: part of the credit line. */
  releaseLabel?: string
}

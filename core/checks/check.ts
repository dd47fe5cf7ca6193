/**
 * Automatic checks of a proposed change: each looks at one thing and says what it found in a sentence. `ok` is good news worth saying, `warn`
 * asks the reviewer to look, `stop` keeps the submission from being submitted.
 */
import type { Scale } from '../adoption/adopted.ts'
import type { Measurement } from '../catalogue/types.ts'
import type { MeasurementInput } from '../schema/measurement.ts'
import type { Check } from '../schema/submissions.ts'

export type { Check }

/** A measurement that is proposed, as it was typed. */
export interface ProposedMeasurement {
  measurement: MeasurementInput
  /** The measurement (id) that it mends, or null for a new one. */
  replaces: number | null
}

/** What the catalogue knows that a measurement can be held against. */
export interface MeasurementSurroundings {
  /** What the galaxy is called, for sentences. */
  galaxy: string
  /** All that is held of this galaxy; none for one that is new. */
  held: readonly Measurement[]
  scale: Scale
  sourceLabel: string
}

export interface ProposedGalaxy {
  designation: string
  names: readonly string[]
}

export interface GalaxySurroundings {
  /** Galaxies within the search radius of its position, nearest first. */
  near: readonly { name: string; separationArcsec: number }[]
  /** Names of it that another galaxy bears. */
  borne: readonly { name: string; galaxy: string }[]
}

export type MeasurementCheck = (proposed: ProposedMeasurement, surroundings: MeasurementSurroundings) => Check | null
export type GalaxyCheck = (proposed: ProposedGalaxy, surroundings: GalaxySurroundings) => Check | null

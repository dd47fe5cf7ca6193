/**
 * Automatic checks of a proposed change: each looks at one thing and says what it found in a sentence. `ok` is good news worth saying, `warn`
 * asks the reviewer to look, `stop` keeps the submission from being submitted.
 */
import type { Scale } from '../adoption/adopted.ts'
import type { Anchor, Measurement } from '../catalogue/types.ts'
import type { MeasurementInput } from '../schema/measurement.ts'
import type { Check } from '../schema/submissions.ts'

export type { Check }

/** A measurement that is proposed, as it was typed. */
export interface ProposedMeasurement {
  measurement: MeasurementInput
  /** The measurement (id) that it mends, or null for a new one. */
  replaces: number | null
}

/** Who would belong to whom with a measurement, where that differs from now. Hosts by name; null for none. */
export interface HostOutlook {
  own: { before: string | null; after: string | null }
  /** Satellites of the galaxy that would be nobody's, or another's, and galaxies that would become its satellites. */
  satellites: { name: string; before: string | null; after: string | null }[]
}

/** What the catalogue knows that a measurement can be held against. */
export interface MeasurementSurroundings {
  /** What the galaxy is called, for sentences. */
  galaxy: string
  /** Where it is, deg ICRS. */
  position: { ra: number; dec: number } | null
  /** All that is held of this galaxy; none for one that is new. */
  held: readonly Measurement[]
  scale: Scale
  sourceLabel: string
  /** What is missing of the source, in words: "a DOI, bibcode or address". */
  sourceLacks: readonly string[]
  /** Other galaxies that hold this very value of the same quantity from the same source. */
  elsewhere: readonly string[]
  /** null where the measurement can move nobody; `many` where there are too many changes to look into each. */
  outlook: HostOutlook | 'many' | null
}

export interface ProposedGalaxy {
  designation: string
  names: readonly string[]
  /** deg, ICRS */
  ra: number
  dec: number
}

export interface GalaxySurroundings {
  /** Galaxies near its position, nearest first, with their half-light radii (semi-major) where known. */
  near: readonly { name: string; separationArcsec: number; halfLightArcmin: number | null }[]
  /** Names of it that another galaxy bears. */
  borne: readonly { name: string; galaxy: string }[]
  /** How many measurements of it the same submission brings. */
  measurements: number
}

/** A galaxy that is held, whose fields or names would change. */
export interface ProposedAmendment {
  galaxy: string
  position: { ra: number; dec: number }
  /** Its position afterwards. */
  moved: { ra: number; dec: number }
  /** Names that it would get. */
  names: readonly string[]
  halfLightArcmin: number | null
}

/** An anchor's value that would change. */
export interface ProposedAnchor {
  before: Pick<Anchor, 'label' | 'value' | 'err'> | null
  after: Pick<Anchor, 'label' | 'value' | 'err'>
}

export type MeasurementCheck = (proposed: ProposedMeasurement, surroundings: MeasurementSurroundings) => Check | null
export type GalaxyCheck = (proposed: ProposedGalaxy, surroundings: GalaxySurroundings) => Check | null

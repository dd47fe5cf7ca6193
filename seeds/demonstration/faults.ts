/**
 * The slips that are planted in the submissions of the demonstration, for reviewers to find: where each is, and which check points at it. A test
 * holds the checks to this list, and everything that is not on it to be left alone.
 */
export interface PlantedFault {
  /** Title of the submission, or how it begins. */
  submission: string
  /** Place of the change in it, from 0. */
  change: number
  /** The check that finds it. */
  check: string
  /** What happened, in the invented curator's life. */
  story: string
}

export const HURRY = 'Three more satellites, from table 5'
export const CANDIDATES = 'Two new candidates'
export const OWN_SCALE = 'Distances of four galaxies on a scale of their own'
export const VELOCITIES = 'Velocities of the second survey'

export const PLANTED_FAULTS: readonly PlantedFault[] = [
  { submission: HURRY, change: 0, check: 'unit-slip', story: 'the paper’s megaparsecs were entered as kiloparsecs' },
  { submission: HURRY, change: 1, check: 'agreement', story: 'a five-sigma outlier: a neighbour’s tip was taken for this galaxy’s' },
  { submission: HURRY, change: 2, check: 'anchor-stated', story: 'the anchor value that the paper names was left out' },
  { submission: HURRY, change: 3, check: 'error-bar', story: 'a hundredth of the error was typed' },
  { submission: CANDIDATES, change: 1, check: 'near-galaxy', story: 'the candidate is a known galaxy’s outskirts' },
  { submission: CANDIDATES, change: 3, check: 'designation-digits', story: 'its designation was made from a rounded position' },
  { submission: CANDIDATES, change: 3, check: 'bare-galaxy', story: 'nothing is measured of it yet' },
  { submission: OWN_SCALE, change: 0, check: 'agreement', story: 'the whole paper hangs on a zero point 0.6 mag off that it does not give' },
  { submission: OWN_SCALE, change: 1, check: 'agreement', story: 'the same zero point' },
  { submission: OWN_SCALE, change: 2, check: 'agreement', story: 'the same zero point' },
  { submission: OWN_SCALE, change: 3, check: 'agreement', story: 'the same zero point' },
  { submission: VELOCITIES, change: 0, check: 'digit-slip', story: 'the sign of the velocity was lost' },
  { submission: VELOCITIES, change: 1, check: 'digit-slip', story: 'a wrong first digit' },
  { submission: VELOCITIES, change: 2, check: 'elsewhere', story: 'the row of the next galaxy was entered twice' },
  { submission: VELOCITIES, change: 3, check: 'elsewhere', story: 'the row that it was taken from' },
  { submission: VELOCITIES, change: 4, check: 'entered-before', story: 'entered once already' },
]

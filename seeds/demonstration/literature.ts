/** Invented sources, each marked as such: kind `demonstration`, venue "Invented". */
import type { MethodKey } from '../../core/methods.ts'
import type { Random } from '../../core/random.ts'
import { AUTHORS } from './names.ts'

export interface InventedSource {
  title: string
  authors: string[]
  year: number
  venue: string
  /** What it measures. */
  about: MethodKey | 'survey'
}

const TITLES: readonly (readonly [InventedSource['about'], string])[] = [
  ['trgb', 'Tip of the red giant branch distances to dwarfs of the invented neighbourhood'],
  ['trgb', 'Resolved stars at the edge of three invented systems'],
  ['trgb', 'A uniform red giant branch scale for nearby invented galaxies'],
  ['trgb', 'Faint companions, their tips and their distances'],
  ['cepheids', 'Cepheids in the invented spirals'],
  ['cepheids', 'Near-infrared period-luminosity distances, invented'],
  ['rr-lyrae', 'RR Lyrae variables in the nearest invented dwarfs'],
  ['horizontal-branch', 'Horizontal branches of ancient invented satellites'],
  ['sbf', 'Surface-brightness fluctuations of diffuse invented dwarfs'],
  ['pnlf', 'Planetary nebulae beyond the nearest invented groups'],
  ['tully-fisher', 'An invented baryonic Tully-Fisher sample'],
  ['tully-fisher', 'Line widths and distances of gas-rich invented galaxies'],
  ['brightest-stars', 'Photographic distances from brightest stars, invented'],
  ['jagb', 'Carbon stars as candles in the invented neighbourhood'],
  ['eclipsing-binaries', 'Two eclipsing binaries and an invented zero point'],
  ['survey', 'The Demo Survey I: photometry'],
  ['survey', 'The Demo Survey II: velocities and neutral hydrogen'],
  ['survey', 'The Demo Survey III: structure of nearby dwarfs'],
  ['survey', 'An invented atlas of foreground reddening'],
  ['survey', 'The Demo Survey IV: g and r magnitudes of dwarfs'],
  ['survey', 'Isophotal diameters on invented plates'],
  ['geometric', 'The centre of our invented galaxy from the orbits of its stars'],
]

export function literature(draw: Random): InventedSource[] {
  return TITLES.map(([about, title], i) => {
    const size = 1 + draw.integer(4)
    const first = draw.integer(AUTHORS.length)
    const authors = Array.from({ length: size }, (_, k) => AUTHORS[(first + k * 3) % AUTHORS.length] ?? '')
    return { title, authors, year: 2006 + ((i * 7 + draw.integer(3)) % 20), venue: 'Invented', about }
  })
}

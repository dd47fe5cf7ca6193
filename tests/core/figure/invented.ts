/** Invented galaxies for drawing: hosts with their companions, spread about the supergalactic plane, and a field between them. Seeded. */
import { convert } from '../../../core/astro/frames.ts'
import { directionOf } from '../../../core/astro/sphere.ts'
import { GALAXY_CLASSES, type GalaxyClass } from '../../../core/classes.ts'
import type { FigureGalaxy } from '../../../core/figure/galaxy.ts'
import { random, type Random } from '../../../core/random.ts'

const HOSTS = ['Eldermere', 'Tamsin', 'Ostrel', 'Pallas Reach', 'Brightwater', 'Vesk', 'Corvane', 'Ansel', 'Quarrow', 'Hollin', 'Mirrow', 'Ålund']
const COMPANIONS: GalaxyClass[] = ['dwarf-spheroidal', 'dwarf-spheroidal', 'dwarf-irregular', 'ultra-faint', 'dwarf-elliptical', 'transition', 'blue-compact']

export function inventedGalaxies(count: number, seed = 1): FigureGalaxy[] {
  const rng = random(seed)
  const galaxies: FigureGalaxy[] = []
  const add = (name: string, galaxyClass: GalaxyClass, [sgx, sgy, sgz]: [number, number, number], absV: number | null, relation: FigureGalaxy['relation'], host: string | null): void => {
    const distance = Math.hypot(sgx, sgy, sgz)
    const { lon, lat } = directionOf([sgx / distance, sgy / distance, sgz / distance])
    const { lon: ra, lat: dec } = convert(lon, lat, 'supergalactic', 'equatorial')
    const id = galaxies.length + 1
    const unplaced = rng.uniform() < 0.02
    galaxies.push({
      id, slug: name.toLowerCase().replace(/ /g, '-'), name, class: galaxyClass, ra, dec, absV, host, relation,
      distance: unplaced ? null : distance, distanceLo: unplaced ? null : distance * 0.96, distanceHi: unplaced ? null : distance * 1.05,
      sgx: unplaced ? null : sgx, sgy: unplaced ? null : sgy, sgz: unplaced ? null : sgz,
    })
  }
  const hosts = HOSTS.map((name) => ({ name, at: place(rng, 1 + 9 * Math.sqrt(rng.uniform()), 1.2) }))
  for (const host of hosts) add(host.name, rng.uniform() < 0.75 ? 'spiral' : rng.pick(['lenticular', 'elliptical']), host.at, -19.5 - 2 * rng.uniform(), 'host', null)
  for (let i = galaxies.length; i < count; i += 1) {
    if (rng.uniform() < 0.66) {
      const host = rng.pick(hosts)
      const reach = 0.35 * rng.uniform() ** 0.6
      const at: [number, number, number] = [host.at[0] + reach * rng.normal(), host.at[1] + reach * rng.normal(), host.at[2] + reach * rng.normal()]
      add(`${host.name} ${roman(i)}`, rng.pick(COMPANIONS), at, -5 - 11 * rng.uniform() ** 1.6, 'satellite', host.name.toLowerCase())
    } else add(`VG ${1000 + i}`, rng.pick(GALAXY_CLASSES), place(rng, 10.5 * rng.uniform() ** 0.5, 2.6), rng.uniform() < 0.1 ? null : -8 - 9 * rng.uniform(), 'field', null)
  }
  return galaxies
}

function place(rng: Random, distance: number, thickness: number): [number, number, number] {
  const angle = 2 * Math.PI * rng.uniform()
  return [distance * Math.cos(angle), distance * Math.sin(angle), thickness * rng.normal()]
}

function roman(i: number): string {
  return ['I', 'II', 'III', 'IV', 'V', 'VI', 'VII', 'VIII', 'IX', 'X'][i % 10] ?? 'I'
}

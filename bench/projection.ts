/** Putting 100,000 galaxies on the map: our typed arrays beside d3's projection of one at a time, both in this run. */
import { geoHammer } from 'd3-geo-projection'
import { projectGalaxies, unitVectors } from '../core/figure/project-galaxies.ts'
import { random } from '../core/random.ts'

const GALAXIES = 100_000
const ROUNDS = 15
const BAR = 3

const draw = random(3)
const galaxies = Array.from({ length: GALAXIES }, () => ({ ra: 360 * draw.uniform(), dec: (180 / Math.PI) * Math.asin(2 * draw.uniform() - 1) }))
const vectors = unitVectors(galaxies)
const out = new Float64Array(2 * GALAXIES)
const d3 = geoHammer().reflectX(true).rotate([10, 20, 30])

/** The least of several rounds, ms: the one that was disturbed least. */
function least(work: () => void): number {
  return Math.min(
    ...Array.from({ length: ROUNDS }, () => {
      const begun = performance.now()
      work()
      return performance.now() - begun
    }),
  )
}

const ours = least(() => void projectGalaxies({ projection: 'hammer', frame: 'galactic', centreLon: 40 }, vectors, { centreX: 0, centreY: 0, halfWidth: 100 }, out))
const theirs = least(() => {
  for (const { ra, dec } of galaxies) d3([ra, dec])
})
process.stdout.write(`${GALAXIES} galaxies: typed arrays ${ours.toFixed(2)} ms, d3 ${theirs.toFixed(2)} ms, ${(theirs / ours).toFixed(1)} times as fast (bar ${BAR})\n`)
if (theirs / ours < BAR) process.exitCode = 1

import { rotation, type Frame } from '../astro/frames.ts'
import { radians } from '../astro/units.ts'
import { multiply, type Matrix } from '../astro/vector.ts'

/** From ICRS to a frame turned so that a longitude of it looks along the x axis. @param centreLon - deg */
export function turnedFrame(frame: Frame, centreLon: number): Matrix {
  const c = radians(centreLon)
  return multiply([[Math.cos(c), Math.sin(c), 0], [-Math.sin(c), Math.cos(c), 0], [0, 0, 1]], rotation('equatorial', frame))
}

import { describe, expect, it } from 'vitest'
import { angleBetween, unitVector } from '../../../core/astro/sphere.ts'
import { cross, dot, length, type Vector } from '../../../core/astro/vector.ts'
import { random } from '../../../core/random.ts'
import { flatteningOf, secondMoments } from '../../../core/systems/flattening.ts'
import { symmetricEigen, type Symmetric } from '../../../core/systems/symmetric-eigen.ts'
import { numpy } from './numpy.ts'
import { isotropic } from './satellites.ts'

describe('symmetricEigen', () => {
  it('agrees with numpy.linalg.eigh on 300 matrices, nearly equal eigenvalues and planes among them', () => {
    const draw = random(6)
    const matrices = Array.from({ length: 300 }, (_, k): Symmetric => {
      const points = isotropic(draw, 12, 100).map((p): Vector => [p[0], p[1], k % 3 === 0 ? 1e-7 * p[2] : p[2]])
      return k % 5 === 0 ? [4, 4 + 1e-9 * draw.normal(), 4 - 1e-9 * draw.normal(), 1e-9 * draw.normal(), 1e-9, 0] : secondMoments(points)
    })
    const script = `
answer = []
for xx, yy, zz, xy, xz, yz in given:
    w, v = np.linalg.eigh(np.array([[xx, xy, xz], [xy, yy, yz], [xz, yz, zz]]))
    answer.append([list(w[::-1]), [list(v[:, k]) for k in (2, 1, 0)]])`
    const answer = numpy<[Vector, [Vector, Vector, Vector]][]>(script, matrices)
    matrices.forEach((matrix, i) => {
      const { values, vectors } = symmetricEigen(matrix)
      const [expected, axes] = answer[i] ?? [[NaN, NaN, NaN], []]
      for (const k of [0, 1, 2] as const) expect(Math.abs(values[k] - expected[k])).toBeLessThan(1e-12 * expected[0])
      expect(dot(cross(vectors[0], vectors[1]), vectors[2]) ** 2).toBeCloseTo(1, 12)
      // Directions are compared where the eigenvalues stand apart.
      if (expected[1] - expected[2] > 0.02 * expected[0]) expect(Math.abs(dot(vectors[2], axes[2] ?? [0, 0, 0]))).toBeCloseTo(1, 11)
      if (expected[0] - expected[1] > 0.02 * expected[0]) expect(Math.abs(dot(vectors[0], axes[0] ?? [0, 0, 0]))).toBeCloseTo(1, 11)
    })
  })

  it('leaves a diagonal matrix as it is, largest first', () => {
    expect(symmetricEigen([2, 7, 5, 0, 0, 0])).toEqual({ values: [7, 5, 2], vectors: [[0, 1, 0], [0, 0, 1], [1, 0, 0]] })
    expect(symmetricEigen([0, 0, 0, 0, 0, 0]).values).toEqual([0, 0, 0])
  })
})

describe('flatteningOf', () => {
  it('finds the axes of a cross of known lengths', () => {
    // Rms along x: sqrt(2·300²/6); along y: 200; along z: 60.
    const arms: Vector[] = [[300, 0, 0], [-300, 0, 0], [0, 200, 0], [0, -200, 0], [0, 0, 60], [0, 0, -60]]
    const found = flatteningOf(arms)
    expect(found).toMatchObject({ minorToMajor: expect.closeTo(0.2, 12), middleToMajor: expect.closeTo(2 / 3, 12), height: expect.closeTo(60 / Math.sqrt(3), 10), pole: { sgb: 90 } })
    expect(found?.axes).toEqual([[1, 0, 0], [0, 1, 0], [0, 0, 1]])
  })

  it('is about the host, not about the middle of the satellites', () => {
    // A flat sheet of satellites 100 kpc above the host is no plane through the host.
    const draw = random(2)
    const sheet = Array.from({ length: 40 }, (): Vector => [200 * draw.normal(), 200 * draw.normal(), 100])
    expect(flatteningOf(sheet)?.height).toBeGreaterThan(90)
  })

  it('finds a planted plane, whichever way it is tilted, and gives its northern pole', () => {
    const draw = random(13)
    for (let k = 0; k < 60; k++) {
      const normal = unitVector(360 * draw.uniform(), 180 * draw.uniform() - 90)
      const flat = isotropic(draw, 25, 200).map((p): Vector => {
        const out = dot(p, normal) * 0.95
        return [p[0] - out * normal[0], p[1] - out * normal[1], p[2] - out * normal[2]]
      })
      const found = flatteningOf(flat)
      if (!found) throw new Error('25 satellites have a shape')
      const apart = angleBetween(found.axes[2], normal)
      expect(Math.min(apart, Math.PI - apart)).toBeLessThan(0.05)
      expect(found.minorToMajor).toBeLessThan(0.1)
      expect(found.pole.sgb).toBeGreaterThanOrEqual(0)
      expect(angleBetween(unitVector(found.pole.sgl, found.pole.sgb), found.axes[2])).toBeLessThan(1e-12)
      // Right-handed unit vectors; the height is the rms distance from the plane.
      expect(dot(cross(found.axes[0], found.axes[1]), found.axes[2])).toBeCloseTo(1, 12)
      const rms = Math.sqrt(flat.reduce((sum, p) => sum + dot(p, found.axes[2]) ** 2, 0) / flat.length)
      expect(found.height).toBeCloseTo(rms, 9)
      expect(found.minorToMajor).toBeLessThanOrEqual(found.middleToMajor)
      expect(found.axes.every((axis) => Math.abs(length(axis) - 1) < 1e-12)).toBe(true)
    }
  })

  it('does not change with the unit, nor when the system is turned', () => {
    const points = isotropic(random(4), 9, 150)
    const before = flatteningOf(points)
    const scaled = flatteningOf(points.map(([x, y, z]): Vector => [x / 1000, y / 1000, z / 1000]))
    const turned = flatteningOf(points.map(([x, y, z]): Vector => [y, z, x]))
    expect(scaled?.minorToMajor).toBeCloseTo(before?.minorToMajor ?? NaN, 12)
    expect(turned?.minorToMajor).toBeCloseTo(before?.minorToMajor ?? NaN, 12)
    expect(turned?.height).toBeCloseTo(before?.height ?? NaN, 9)
  })

  it('says nothing of four', () => {
    expect(flatteningOf(isotropic(random(1), 4, 100))).toBeNull()
    expect(flatteningOf(isotropic(random(1), 5, 100))).not.toBeNull()
  })
})

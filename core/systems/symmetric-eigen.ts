/** Eigenvalues and eigenvectors of symmetric 3×3 matrices. */
import type { Vector } from '../astro/vector.ts'

/** The six different numbers of a symmetric matrix: xx, yy, zz, xy, xz, yz. */
export type Symmetric = readonly [number, number, number, number, number, number]

export interface Eigen {
  /** Falling. */
  values: Vector
  /** Unit vectors in the order of the values; their signs mean nothing. */
  vectors: readonly [Vector, Vector, Vector]
}

/** Off-diagonal elements this small against the matrix are rounding. */
const NEGLIGIBLE = 1e-30
const MOST_SWEEPS = 30

/**
 * By cyclic Jacobi rotations: slower than the closed form, and right to rounding where two eigenvalues nearly agree, which the closed form
 * is not.
 *
 * @param matrix - finite numbers
 * @see Golub & Van Loan, Matrix Computations, section 8.5 (from memory)
 */
export function symmetricEigen(matrix: Symmetric): Eigen {
  const [xx, yy, zz, xy, xz, yz] = matrix
  const a: Rows = [[xx, xy, xz], [xy, yy, yz], [xz, yz, zz]]
  const v: Rows = [[1, 0, 0], [0, 1, 0], [0, 0, 1]]
  const scale = xx * xx + yy * yy + zz * zz + 2 * (xy * xy + xz * xz + yz * yz)
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
    if (a[0][1] ** 2 + a[0][2] ** 2 + a[1][2] ** 2 <= NEGLIGIBLE * scale) break
    rotate(a, v, 0, 1, 2)
    rotate(a, v, 0, 2, 1)
    rotate(a, v, 1, 2, 0)
  }
  const found = ([0, 1, 2] as const).map((k) => ({ value: a[k][k], vector: [v[0][k], v[1][k], v[2][k]] satisfies Vector }))
  const [first, second, third] = found.sort((p, q) => q.value - p.value)
  if (!first || !second || !third) throw new RangeError('a matrix of three rows has three eigenvalues')
  return { values: [first.value, second.value, third.value], vectors: [first.vector, second.vector, third.vector] }
}

type Row = [number, number, number]
type Rows = [Row, Row, Row]
type Place = 0 | 1 | 2

/** Turns the plane of axes p and q so that a[p][q] vanishes; r is the third axis. */
function rotate(a: Rows, v: Rows, p: Place, q: Place, r: Place): void {
  const off = a[p][q]
  if (off === 0) return
  const theta = (a[q][q] - a[p][p]) / (2 * off)
  const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.hypot(theta, 1))
  const c = 1 / Math.hypot(t, 1)
  const s = t * c
  a[p][p] -= t * off
  a[q][q] += t * off
  a[p][q] = a[q][p] = 0
  const rp = a[r][p]
  const rq = a[r][q]
  a[r][p] = a[p][r] = c * rp - s * rq
  a[r][q] = a[q][r] = s * rp + c * rq
  for (const row of v) {
    const vp = row[p]
    const vq = row[q]
    row[p] = c * vp - s * vq
    row[q] = s * vp + c * vq
  }
}

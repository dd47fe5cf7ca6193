/** Vectors and rotations in three dimensions. */
export type Vector = readonly [number, number, number]
/** Three rows. */
export type Matrix = readonly [Vector, Vector, Vector]

export function dot(a: Vector, b: Vector): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

export function cross(a: Vector, b: Vector): Vector {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]
}

export function length(a: Vector): number {
  return Math.hypot(a[0], a[1], a[2])
}

/** The matrix times the vector. */
export function turn(m: Matrix, v: Vector): Vector {
  return [dot(m[0], v), dot(m[1], v), dot(m[2], v)]
}

/** Of a rotation, the inverse. */
export function transpose(m: Matrix): Matrix {
  return [
    [m[0][0], m[1][0], m[2][0]],
    [m[0][1], m[1][1], m[2][1]],
    [m[0][2], m[1][2], m[2][2]],
  ]
}

/** a times b: first b, then a. */
export function multiply(a: Matrix, b: Matrix): Matrix {
  const columns = transpose(b)
  const row = (r: Vector): Vector => [dot(r, columns[0]), dot(r, columns[1]), dot(r, columns[2])]
  return [row(a[0]), row(a[1]), row(a[2])]
}

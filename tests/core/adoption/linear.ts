/** Gauss' elimination with pivots: an independent way to the same numbers. */
export function solve(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const rows = matrix.map((row, i) => [...row, right[i] ?? 0])
  const n = rows.length
  const at = (i: number, j: number): number => rows[i]?.[j] ?? NaN
  for (let k = 0; k < n; k++) {
    const pivot = [...Array(n - k).keys()].map((i) => i + k).reduce((best, i) => (Math.abs(at(i, k)) > Math.abs(at(best, k)) ? i : best), k)
    ;[rows[k], rows[pivot]] = [rows[pivot] ?? [], rows[k] ?? []]
    for (let i = 0; i < n; i++) {
      if (i === k) continue
      const factor = at(i, k) / at(k, k)
      rows[i] = (rows[i] ?? []).map((v, j) => v - factor * at(k, j))
    }
  }
  return rows.map((row, i) => (row[n] ?? NaN) / at(i, i))
}

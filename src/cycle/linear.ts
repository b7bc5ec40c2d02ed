/**
 * Solves A x = b by elimination with row exchanges.
 *
 * @param matrix n x n, row-major; left as it is
 * @returns x, or null where A is singular to working precision
 */
export function solveLinear(matrix: Float64Array, right: Float64Array): Float64Array | null {
  const size = right.length;
  const a = Float64Array.from(matrix);
  const x = Float64Array.from(right);
  const at = (row: number, column: number): number => a[row * size + column] as number;
  for (let pivot = 0; pivot < size; pivot++) {
    let best = pivot;
    for (let row = pivot + 1; row < size; row++) if (Math.abs(at(row, pivot)) > Math.abs(at(best, pivot))) best = row;
    if (Math.abs(at(best, pivot)) < 1e-14) return null;
    if (best !== pivot) {
      for (let column = 0; column < size; column++) {
        const held = at(pivot, column);
        a[pivot * size + column] = at(best, column);
        a[best * size + column] = held;
      }
      const held = x[pivot] as number;
      x[pivot] = x[best] as number;
      x[best] = held;
    }
    for (let row = pivot + 1; row < size; row++) {
      const factor = at(row, pivot) / at(pivot, pivot);
      if (factor === 0) continue;
      for (let column = pivot; column < size; column++) a[row * size + column] = at(row, column) - factor * at(pivot, column);
      x[row] = (x[row] as number) - factor * (x[pivot] as number);
    }
  }
  for (let row = size - 1; row >= 0; row--) {
    let sum = x[row] as number;
    for (let column = row + 1; column < size; column++) sum -= at(row, column) * (x[column] as number);
    x[row] = sum / at(row, row);
  }
  return x;
}

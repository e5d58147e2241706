/**
 * Compensated summation: the rounding error of every addition is kept and added at the end.
 *
 * Returns through `value` a sum whose error is at most about 2 u |Σ x| + n² u² Σ|x| (u = 2^-53).
 *
 * Source: A. Neumaier, Z. Angew. Math. Mech. 54 (1974) 39.
 */
export class NeumaierSum {
  private sum = 0;
  private compensation = 0;

  add(term: number): void {
    const next = this.sum + term;
    this.compensation +=
      Math.abs(this.sum) >= Math.abs(term) ? this.sum - next + term : term - next + this.sum;
    this.sum = next;
  }

  get value(): number {
    // An infinite sum has a NaN compensation: the infinity is the answer.
    return Number.isFinite(this.sum) ? this.sum + this.compensation : this.sum;
  }
}

/** Compensated sum of `terms`; see NeumaierSum for error and source. */
export function neumaierSum(terms: Iterable<number>): number {
  const sum = new NeumaierSum();
  for (const term of terms) sum.add(term);
  return sum.value;
}

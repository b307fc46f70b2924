/**
 * Numbers at places 0 … n − 1 that are raised range by range, with their maximum at hand: a binary tree whose nodes
 * hold what was added to all below them and the largest sum below. Every operation takes O(log n).
 */
export class RangeMaximum {
  private readonly size: number;
  private readonly most: Float64Array;
  private readonly added: Float64Array;

  constructor(values: Float64Array) {
    let size = 1;
    while (size < values.length) size *= 2;
    this.size = size;
    this.most = new Float64Array(2 * size).fill(Number.NEGATIVE_INFINITY);
    this.added = new Float64Array(2 * size);
    this.most.set(values, size);
    for (let i = size - 1; i > 0; i--) this.most[i] = Math.max(this.most[2 * i]!, this.most[2 * i + 1]!);
  }

  /** Adds to places from … end − 1. */
  add(from: number, end: number, value: number): void {
    const { size, most, added } = this;
    if (from >= end || value === 0) return;
    let left = from + size;
    let right = end + size - 1;
    const firstLeft = left;
    const lastRight = right;
    for (; left <= right; left >>= 1, right >>= 1) {
      if (left & 1) {
        most[left] = most[left]! + value;
        if (left < size) added[left] = added[left]! + value;
        left++;
      }
      if (!(right & 1)) {
        most[right] = most[right]! + value;
        if (right < size) added[right] = added[right]! + value;
        right--;
      }
    }
    this.pull(firstLeft);
    this.pull(lastRight);
  }

  private pull(leaf: number): void {
    const { most, added } = this;
    for (let i = leaf >> 1; i > 0; i >>= 1) {
      const a = most[2 * i]!;
      const b = most[2 * i + 1]!;
      most[i] = Math.max(a, b) + added[i]!;
    }
  }

  /** The largest of all. */
  get maximum(): number {
    return this.most[1]!;
  }

  /** The largest of places from … end − 1, −∞ where there are none. */
  maximumOf(from: number, end: number): number {
    return from < end ? this.within(1, 0, this.size, from, end) : Number.NEGATIVE_INFINITY;
  }

  private within(node: number, low: number, high: number, from: number, end: number): number {
    if (from <= low && high <= end) return this.most[node]!;
    const middle = (low + high) / 2;
    let most = Number.NEGATIVE_INFINITY;
    if (from < middle) most = this.within(2 * node, low, middle, from, end);
    if (end > middle) most = Math.max(most, this.within(2 * node + 1, middle, high, from, end));
    return most + this.added[node]!;
  }

  /** A place where the maximum is. */
  get place(): number {
    const { size, most } = this;
    let i = 1;
    while (i < size) i = most[2 * i]! >= most[2 * i + 1]! ? 2 * i : 2 * i + 1;
    return i - size;
  }
}

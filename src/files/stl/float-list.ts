/** Float32 numbers whose count is not known beforehand. */
export class FloatList {
  length = 0;
  private values = new Float32Array(1024);

  push(value: number): void {
    if (this.length === this.values.length) {
      const longer = new Float32Array(2 * this.length);
      longer.set(this.values);
      this.values = longer;
    }
    this.values[this.length++] = value;
  }

  /** A copy of exactly the numbers, in memory of its own. */
  toArray(): Float32Array {
    return this.values.slice(0, this.length);
  }
}

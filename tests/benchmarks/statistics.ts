/** A table to print: the first column to the left, numbers to the right. */
export interface Table {
  readonly title: string;
  readonly head: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** Milliseconds of single runs, for about so many milliseconds; three runs at least. */
export function times(run: () => void, budget: number): number[] {
  const found: number[] = [];
  const end = performance.now() + budget;
  while (found.length < 3 || performance.now() < end) {
    const begin = performance.now();
    run();
    found.push(performance.now() - begin);
  }
  return found;
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)]!;
}

/** The power of x with which y grows: least squares on logarithms. */
export function exponent(points: readonly (readonly [number, number])[]): number {
  const logs = points.map(([x, y]) => [Math.log(x), Math.log(y)] as const);
  const mean = (axis: 0 | 1): number => logs.reduce((sum, point) => sum + point[axis], 0) / logs.length;
  const [x, y] = [mean(0), mean(1)];
  const along = logs.reduce((sum, point) => sum + (point[0] - x) ** 2, 0);
  return logs.reduce((sum, point) => sum + (point[0] - x) * (point[1] - y), 0) / along;
}

export function print({ title, head, rows }: Table): string {
  const widths = head.map((_, i) => Math.max(...[head, ...rows].map((row) => row[i]!.length)));
  const line = (row: readonly string[]): string =>
    row.map((cell, i) => (i === 0 ? cell.padEnd(widths[i]!) : cell.padStart(widths[i]!))).join('  ');
  return [title, line(head), ...rows.map(line)].join('\n');
}

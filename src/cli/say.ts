/** Results, for pipes and people. */
export const result = (text: string): void => {
  process.stdout.write(`${text}\n`);
};

/** Words beside the result. */
export const remark = (text: string): void => {
  process.stderr.write(`${text}\n`);
};

export const json = (value: unknown): void => result(JSON.stringify(value, null, 2));

/** Width on the terminal: combining marks take none. */
const width = (text: string): number => [...text.replace(/\p{M}/gu, '')].length;

/** Rows as aligned columns. Columns whose head starts with `>` stand right. */
export function table(heads: readonly string[], rows: readonly (readonly string[])[]): string {
  const right = heads.map((head) => head.startsWith('>'));
  const all = [heads.map((head) => head.replace(/^>/, '')), ...rows];
  const widths = heads.map((_, column) => Math.max(...all.map((row) => width(row[column] ?? ''))));
  return all
    .map((row) =>
      row
        .map((cell, column) => {
          const space = ' '.repeat(widths[column]! - width(cell));
          return right[column] ? space + cell : cell + space;
        })
        .join('  ')
        .trimEnd(),
    )
    .join('\n');
}

/** More make the words too small on a page of usual width. */
const MOST = 10;
/** Sheets are between square and so much wider than high, in cells. */
const WIDEST = 1.45;

/** A column less counts as much as this share of the last row left empty. */
const PER_COLUMN = 0.09;

/** Columns for a number of crystals: of those that make a well-proportioned sheet the ones that fill the last row best. */
export function sheetColumns(count: number): number {
  const side = Math.sqrt(count);
  const fewest = Math.min(Math.ceil(side), MOST - 2);
  const most = Math.max(fewest, Math.min(MOST, Math.round(WIDEST * side)));
  const cost = (columns: number): number =>
    ((columns - (count % columns)) % columns) / columns + PER_COLUMN * (most - columns);
  let best = most;
  for (let columns = most - 1; columns >= fewest; columns--) if (cost(columns) < cost(best)) best = columns;
  return best;
}

/** ST_Number of the 3MF core schema: a dot for the decimals, none at the end, no infinity. */
const NUMBER = /^\s*[-+]?(?:\d+(?:\.\d+)?|\.\d+)(?:[eE][-+]?\d+)?\s*$/;

/** NaN where the text is no number by the schema, or none that is finite. */
export function numberIn(text: string | undefined): number {
  if (text === undefined || !NUMBER.test(text)) return Number.NaN;
  const value = Number(text);
  return Number.isFinite(value) ? value : Number.NaN;
}

/** Numbers of resources and indices end below 2^31 (ST_ResourceIndex). NaN where the text is no such number. */
export function indexIn(text: string | undefined): number {
  if (text === undefined || !/^\s*\+?\d+\s*$/.test(text)) return Number.NaN;
  const value = Number(text);
  return value < 2 ** 31 ? value : Number.NaN;
}

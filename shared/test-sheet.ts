/** Reading a table of a tensile test as laboratories export it: text with a column of extension and one of stress. */

export const STRETCH_UNITS = [
  { value: 'stretch', label: 'stretch (1 at rest)' },
  { value: 'strain', label: 'strain (0 at rest)' },
  { value: 'percent', label: 'strain, %' },
] as const;
export type StretchUnit = (typeof STRETCH_UNITS)[number]['value'];

export const STRESS_UNITS = [
  { value: 'Pa', pascals: 1 },
  { value: 'kPa', pascals: 1e3 },
  { value: 'MPa', pascals: 1e6 },
] as const;
export type StressUnit = (typeof STRESS_UNITS)[number]['value'];

export interface TestSheet {
  /** first and second column as written */
  rows: [number, number][];
  /** lines that held no two numbers, such as headings */
  skipped: number;
  /** the words above the columns, when there are some */
  headings: [string, string] | null;
}

const MOST_ROWS = 20_000;

/**
 * Two columns parted by semicolon, tab, comma or spaces; decimal comma where semicolons or tabs part the columns.
 * @throws RangeError with a sentence when it is no such table
 */
export function readTestSheet(text: string): TestSheet {
  const lines = text
    .replace(/^\uFEFF/, '')
    .split(/\r\n|\n|\r/)
    .filter((line) => line.trim() !== '');
  if (lines.length === 0) throw new RangeError('The file is empty. Export the table as CSV and choose it again.');
  const separator = [';', '\t', ','].find(
    (each) => lines.filter((line) => line.includes(each)).length > lines.length / 2,
  );
  const decimalComma = separator === ';' || separator === '\t';
  const cells = (line: string) =>
    (separator ? line.split(separator) : line.trim().split(/\s+/)).map((cell) => cell.trim());
  const number = (cell: string | undefined) => {
    if (cell === undefined || cell === '') return NaN;
    return Number(decimalComma ? cell.replace(',', '.') : cell);
  };
  const rows: [number, number][] = [];
  let skipped = 0;
  let headings: [string, string] | null = null;
  for (const line of lines) {
    const [first, second] = cells(line);
    const pair: [number, number] = [number(first), number(second)];
    if (pair.every(Number.isFinite)) {
      rows.push(pair);
      if (rows.length > MOST_ROWS)
        throw new RangeError(`The table has more than ${MOST_ROWS} rows. Thin it out first.`);
    } else {
      skipped++;
      if (rows.length === 0 && first && second) headings = [first, second];
    }
  }
  if (rows.length < 3)
    throw new RangeError(
      'No table was found: two columns of numbers are needed, extension first, then stress. Export as CSV and choose it again.',
    );
  return { rows, skipped, headings };
}

/**
 * Stretch and nominal stress (Pa) of the sheet's rows in the units given; rows at rest and below are left out.
 * @throws RangeError with a sentence when the units cannot be right
 */
export function testPoints(sheet: TestSheet, extension: StretchUnit, stress: StressUnit): [number, number][] {
  const pascals = STRESS_UNITS.find(({ value }) => value === stress)!.pascals;
  const points = sheet.rows
    .map(([a, b]): [number, number] => [
      extension === 'stretch' ? a : 1 + (extension === 'percent' ? a / 100 : a),
      b * pascals,
    ])
    .filter(([stretch, value]) => stretch > 1 && value > 0);
  if (points.length < 3)
    throw new RangeError('Fewer than three rows are stretched and pull. Check which unit the first column is in.');
  if (Math.max(...points.map(([stretch]) => stretch)) > 20)
    throw new RangeError('Nothing stretches more than twentyfold. Choose another unit for the first column.');
  return points;
}

/** What the first column probably is: percent when values are large, stretch when they start at one. */
export function likelyExtension({ rows, headings }: TestSheet): StretchUnit {
  const words = headings?.[0] ?? '';
  if (/%/.test(words)) return 'percent';
  const values = rows.map(([a]) => a);
  const [low, high] = [Math.min(...values), Math.max(...values)];
  if (high > 20) return 'percent';
  return low >= 0.95 ? 'stretch' : 'strain';
}

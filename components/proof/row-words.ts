import { figures, lengthText } from '../../shared/units';
import type { CaseRow } from '../../solver/index';

/** Errors below this are rounding, not answers. */
const ROUNDING = 1e-9;

export const quantityText = (value: number, unit: string): string =>
  unit === 'm' ? lengthText(value, 'mm', 4) : `${figures(value, 4)}${/^(N m|Hz)$/.test(unit) ? ` ${unit}` : ''}`;

export const textbookText = ({ expected, unit }: CaseRow): string =>
  expected === 0 ? 'exact' : quantityText(expected, unit);

export const hereText = ({ expected, ours, unit }: CaseRow): string =>
  expected === 0 ? ours.toExponential(1).replace('-', '−') : quantityText(ours, unit);

/** The error in words and number: "0.24 % low", "to rounding". */
export function errorText({ error }: CaseRow): string {
  const size = Math.abs(error);
  if (size < ROUNDING) return 'to rounding';
  if (size < 5e-5) return '< 0.01 %';
  return `${figures(100 * size, 2)} % ${error < 0 ? 'low' : 'high'}`;
}

export const passes = ({ error, bar }: CaseRow): boolean => Math.abs(error) < bar;

/** Whether every row of a check keeps its bar, said as a sentence. */
export function verdict(rows: readonly CaseRow[]): string {
  const out = rows.filter((row) => !passes(row));
  return out.length === 0
    ? rows.length === 1
      ? 'Within what is asked of it.'
      : `All ${rows.length} values are within what is asked of them.`
    : `${out.length} of ${rows.length} values are outside what is asked of them: ${out.map((row) => row.what).join('; ')}.`;
}

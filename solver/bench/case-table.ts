import { readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { PUBLISHED_CASES } from '../cases/all-cases';
import type { CaseRow } from '../cases/published-case';
import { bestKernels } from '../kernels/best-kernels';

/** Solves every published case and writes the README's table: one row a quantity, at its finest part count. */
const README = path.join(__dirname, '../../README.md');
const BEGIN = '<!-- cases: written by `npm run cases` -->';
const END = '<!-- end of cases -->';

const percent = (error: number) => `${error < 0 ? '−' : '+'}${(100 * Math.abs(error)).toPrecision(2)} %`;
const number = (value: number) => value.toPrecision(5).replace('-', '−');

function line(id: string, rows: readonly CaseRow[]): string {
  const finest = rows.at(-1)!;
  const coarser = rows.slice(0, -1).map((row) => `${percent(row.error)} at ${row.parts}`);
  const cells = [
    `[${finest.what}](solver/cases/${id}/CASE.md)`,
    finest.source,
    `${number(finest.expected)} ${finest.unit}`.trim(),
    number(finest.ours),
    percent(finest.error),
    String(finest.parts),
    coarser.join(', '),
  ];
  return `| ${cells.join(' | ')} |`;
}

const kernels = bestKernels();
const lines = PUBLISHED_CASES.flatMap((published) => {
  const byWhat = new Map<string, CaseRow[]>();
  for (const row of published.rows(kernels)) byWhat.set(row.what, [...(byWhat.get(row.what) ?? []), row]);
  return [...byWhat.values()].map((rows) => line(published.id, rows));
});
const table = [
  '| case | source | value | ours | error | parts | with fewer parts |',
  '| --- | --- | --- | --- | --- | --- | --- |',
  ...lines,
].join('\n');
const text = readFileSync(README, 'utf8');
const [from, to] = [text.indexOf(BEGIN), text.indexOf(END)];
if (from < 0 || to < from) throw new Error(`README.md has lost its marks “${BEGIN}” and “${END}”. Put them back.`);
writeFileSync(README, `${text.slice(0, from + BEGIN.length)}\n\n${table}\n\n${text.slice(to)}`);

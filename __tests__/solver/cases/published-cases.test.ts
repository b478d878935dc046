import { PUBLISHED_CASES } from '../../../solver/cases/all-cases';
import type { CaseRow } from '../../../solver/cases/published-case';
import { bestKernels } from '../../../solver/index';

// Sources, set-ups and tolerances: solver/cases/<id>/CASE.md.
describe.each(PUBLISHED_CASES.map((published) => [published.id, published] as const))('%s', (_, published) => {
  const rows = published.rows(bestKernels());

  it.each(rows.map((row) => [row.what, row.parts, row] as const))('%s, %s parts', (_what, _parts, row) => {
    expect(Math.abs(row.error)).toBeLessThan(row.bar);
  });

  if (published.converges) {
    it('more parts are closer', () => {
      const byWhat = new Map<string, CaseRow[]>();
      for (const row of rows) byWhat.set(row.what, [...(byWhat.get(row.what) ?? []), row]);
      const series = [...byWhat.values()].filter((list) => list.length > 1);
      expect(series.length).toBeGreaterThan(0);
      for (const list of series) expect(Math.abs(list.at(-1)!.error)).toBeLessThan(Math.abs(list[0]!.error));
    });
  }
});

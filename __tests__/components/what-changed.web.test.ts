import { whatChanged } from '../../components/today/what-changed';
import type { Model } from '../../shared/wire/models';
import type { Run } from '../../shared/wire/runs';
import type { SceneSummary } from '../../shared/wire/scenes';

const joss = { id: 'p', name: 'Joss' };
const model = { id: 'm', name: 'Pudding', createdAt: '2026-12-01T08:00:00.000Z', createdBy: joss } as Model;
const scene = {
  id: 's',
  name: 'Wobble',
  latestRevision: { id: 'r2', number: 2, remark: '', createdAt: '2026-12-01T09:30:00.000Z', createdBy: joss },
} as SceneSummary;
const run = (number: number, completedAt: string | null) =>
  ({ id: `run${number}`, number, completedAt, createdBy: joss, scene: { id: 's', name: 'Wobble' } }) as Run;

it('tells who did what, newest first, and leaves out bakes that are not done', () => {
  const changes = whatChanged([model], [scene], [run(1, '2026-12-01T09:00:00.000Z'), run(2, null)], 8);
  expect(changes.map((c) => `${c.words} ${c.thing}`)).toEqual([
    'Joss saved revision 2 of Wobble',
    'Joss baked Wobble, run 1',
    'Joss brought in Pudding',
  ]);
  expect(changes.map((c) => c.to)).toEqual(['/scenes/s', '/runs/run1', '/models/m']);
});

it('keeps to the number asked for', () => {
  expect(whatChanged([model], [scene], [], 1).map((c) => c.id)).toEqual(['r2']);
});

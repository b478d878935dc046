import { fireEvent, render, screen } from '@testing-library/react';
import { XyPlot } from '../../components/charts/xy-plot';
import { convergenceCost } from '../../components/scenes/convergence-cost';
import { ProofTable } from '../../components/proof/proof-table';
import { errorText, hereText, passes, textbookText, verdict } from '../../components/proof/row-words';
import type { CheckStates } from '../../components/proof/use-proof';
import { estimateWords } from '../../components/solver-client/estimate-words';
import type { SceneDocument } from '../../shared/scene-document';
import type { CaseRow, ProofResult } from '../../solver/index';

const row = (change: Partial<CaseRow>): CaseRow => ({
  what: 'tip',
  source: 'invented for this test',
  unit: 'm',
  parts: 24,
  expected: 0.004,
  ours: 0.00402,
  error: 0.005,
  bar: 0.01,
  ...change,
});

it('says a value, its textbook and the error in words and number', () => {
  expect([textbookText(row({})), hereText(row({})), errorText(row({}))]).toEqual(['4 mm', '4.02 mm', '0.5 % high']);
  expect(errorText(row({ error: -0.0123 }))).toBe('1.2 % low');
  expect(errorText(row({ error: 2e-5 }))).toBe('< 0.01 %');
  const exact = row({ expected: 0, ours: 7.7e-16, error: 7.7e-16, unit: '' });
  expect([textbookText(exact), hereText(exact), errorText(exact)]).toEqual(['exact', '7.7e−16', 'to rounding']);
  expect(textbookText(row({ expected: 0.0943666, unit: 'N m' }))).toBe('0.09437 N m');
});

it('a row beyond its bar is named in the verdict', () => {
  const off = row({ what: 'tip, 6 parts', error: -0.02 });
  expect([passes(row({})), passes(off)]).toEqual([true, false]);
  expect(verdict([row({}), off])).toBe('1 of 2 values are outside what is asked of them: tip, 6 parts.');
  expect(verdict([row({})])).toBe('Within what is asked of it.');
});

it('tells soft from stiff, and what was compared', () => {
  const estimate = { parts: 24, finerParts: 60, softer: 0.021, apart: 0.022, energy: -0.02, time: null };
  expect(estimateWords(estimate).answer).toBe('About 2.1 % soft against finer parts');
  expect(estimateWords({ ...estimate, softer: -0.0029 }).answer).toBe('About 0.29 % stiff against finer parts');
  expect(estimateWords({ ...estimate, softer: 1e-4, apart: 1e-4 }).answer).toBe('The same with finer parts');
  expect(estimateWords({ ...estimate, time: 0.5 }).note).toContain('24 parts beside 60, at 0.5 s');
});

it('says before what a comparison costs: more for motion, more for more parts, from the speed measured here', () => {
  const scene = (time: SceneDocument['time'], count = 24) =>
    ({ time, parts: { count, order: 'quadratic' } }) as SceneDocument;
  const motion = { kind: 'motion', framesPerSecond: 24, frames: 240, substeps: 1, method: 'backward-euler' } as const;
  const here = { setUpSeconds: 0.5, partCount: 24, rate: null };
  const rest = convergenceCost(scene({ kind: 'static', loadSteps: 1 }), here);
  expect(convergenceCost(scene(motion), here)).toBeGreaterThan(rest);
  expect(convergenceCost(scene(motion, 60), here)).toBeGreaterThan(convergenceCost(scene(motion), here));
  // Two seconds are followed at most, each step twice as exact as a live one: 96 steps at 50 a second, and finer parts.
  expect(convergenceCost(scene(motion), { ...here, setUpSeconds: 0, rate: 50 })).toBeCloseTo((96 / 50) * 5.7, 6);
});

it('lists the checks in every state, and the row beyond its bar is not called passed', () => {
  const result = { rows: [row({})] } as ProofResult;
  const checks: CheckStates = {
    patch: { state: 'waiting' },
    cantilever: { state: 'done', seconds: 1, answer: { result, kernels: 'wasm-simd', solverVersion: '1' } },
    elastica: { state: 'running', share: 0.5 },
    twist: { state: 'stopped' },
    vibration: { state: 'failed', message: 'It broke.' },
    energy: { state: 'waiting' },
  };
  const choose = jest.fn();
  render(<ProofTable checks={checks} chosen="patch" onChoose={choose} />);
  for (const name of [
    'Patch test, not run yet',
    'Cantilever, textbook 4 mm, here 4.02 mm, 0.5 % high',
    'Large bending, here …, 50 % done',
    'Twist, stopped',
    'Free vibration, found no answer',
  ]) {
    screen.getByRole('button', { name });
  }
  fireEvent.click(screen.getByRole('button', { name: /^Cantilever/ }));
  expect(choose).toHaveBeenCalledWith('cantilever');
});

it('shows a plot as a table', () => {
  const curves = [
    { name: 'line', kind: 'textbook' as const, points: [[0, 0], [1, 2.5]] as const }, // prettier-ignore
    { name: 'here', kind: 'here' as const, points: [[1, 2.4]] as const },
  ];
  render(<XyPlot x="load, N" y="way, mm" curves={curves} height={200} />);
  screen.getByRole('img', { name: 'way, mm over load, N: line ends at 2.5, here ends at 2.4' });
  fireEvent.click(screen.getByRole('button', { name: 'Show as a table' }));
  expect(screen.getByRole('table', { name: 'line' }).textContent).toContain('2.5');
});

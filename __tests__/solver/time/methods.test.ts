import { cantilever } from '../../../solver/cases/cantilever/scene';
import { bestKernels } from '../../../solver/kernels/best-kernels';
import { simulateCase } from '../../../solver/cases/published-case';
import type { Scene, TimeMethod } from '../../../solver/scene';
import type { Simulation } from '../../../solver/time/simulation';

/** First bending of the bar, Hz: 3.516015 √(E I / ρ A L⁴) / 2π (Blevins 1979, table 8-1). */
const HERTZ = (3.516015 / (2 * Math.PI)) * Math.sqrt((1e6 * (0.1 ** 4 / 12)) / (1000 * 0.01));

const moving = (method: TimeMethod, stepsPerSecond: number, loss = 0): Scene => {
  const bar = cantilever({ poissonsRatio: 0, parts: 6, load: 'end' });
  return {
    ...bar,
    loads: [],
    materials: [{ ...bar.materials[0]!, loss }],
    time: { kind: 'motion', framesPerSecond: stepsPerSecond, frames: 400, substeps: 1, method },
  };
};

/** The bar let go from its bent rest. */
function released(method: TimeMethod, stepsPerSecond: number, loss = 0): Simulation {
  const simulation = simulateCase(cantilever({ poissonsRatio: 0, parts: 6, load: 'end' }), bestKernels());
  simulation.solveStatic(1);
  simulation.update(moving(method, stepsPerSecond, loss));
  return simulation;
}

/** The highest place of the tip in each of its swings upwards, by a parabola through three steps. */
function peaks(simulation: Simulation, steps: number, dt: number): { time: number; height: number }[] {
  const y: number[] = [];
  for (let k = 0; k < steps; k++) {
    simulation.step({ exact: true });
    y.push(simulation.readouts().gauges[0]!.displacement[2]);
  }
  const out: { time: number; height: number }[] = [];
  for (let from = y.findIndex((value) => value > 0); from >= 0 && from < y.length; ) {
    const length = y.slice(from).findIndex((value) => value < 0);
    if (length < 0) break;
    const swing = y.slice(from, from + length);
    const k = from + swing.indexOf(Math.max(...swing));
    const [a, b, c] = [y[k - 1]!, y[k]!, y[k + 1]!];
    const s = (a - c) / (2 * (a - 2 * b + c));
    out.push({ time: (k + 1 + s) * dt, height: b - ((a - c) * s) / 4 });
    const next = y.slice(from + length).findIndex((value) => value > 0);
    if (next < 0) break;
    from += length + next;
  }
  return out;
}

it.each<[TimeMethod, number]>([
  ['bdf2', 0.03],
  ['hht', 0.03],
  ['tr-bdf2', 0.02],
])('%s keeps the period of the first bending and most of its height', (method, bar) => {
  const stepsPerSecond = 24;
  const all = peaks(released(method, stepsPerSecond), 9 * stepsPerSecond, 1 / stepsPerSecond);
  const period = (all.at(-1)!.time - all[0]!.time) / (all.length - 1);
  expect(Math.abs(period * HERTZ - 1)).toBeLessThan(bar);
  expect(all[1]!.height / all[0]!.height).toBeGreaterThan(0.8);
});

// D. J. Inman, Engineering Vibration: δ = 2πζ/√(1 − ζ²); Clough and Penzien 1993, sec. 12-5: with C = τ K, ζ = ωτ/2.
it('a loss factor of .4 at 2 Hz damps the first bending by its logarithmic decrement', () => {
  const stepsPerSecond = 24;
  const steps = 9 * stepsPerSecond;
  const lossy = peaks(released('tr-bdf2', stepsPerSecond, 0.4), steps, 1 / stepsPerSecond);
  const without = peaks(released('tr-bdf2', stepsPerSecond), steps, 1 / stepsPerSecond);
  const decrement = (list: { height: number }[]) => Math.log(list[0]!.height / list[3]!.height) / 3;
  const zeta = (0.4 * (HERTZ / 2)) / 2;
  const expected = (2 * Math.PI * zeta) / Math.sqrt(1 - zeta * zeta);
  expect((decrement(lossy) - decrement(without)) / expected).toBeGreaterThan(0.97);
  expect((decrement(lossy) - decrement(without)) / expected).toBeLessThan(1.03);
});

it.each<TimeMethod>(['bdf2', 'hht', 'tr-bdf2'])('%s goes on from a kept state with the same bits', (method) => {
  const first = released(method, 48, 0.05);
  for (let k = 0; k < 5; k++) first.step({ exact: true, fresh: true });
  const state = first.saveState();
  const second = released(method, 48, 0.05);
  second.restoreState(state);
  for (let k = 0; k < 3; k++) {
    first.step({ exact: true, fresh: true });
    second.step({ exact: true, fresh: true });
  }
  expect(second.coefficients).toEqual(first.coefficients);
  expect(second.saveState()).toEqual(first.saveState());
});

it('refuses a state of another make', () => {
  expect(() => released('hht', 48).restoreState(new Float64Array(7))).toThrow('numbers; ');
});

import { minimise, type NewtonProblem } from '../../../solver/linear/newton';
import { QuasiNewton } from '../../../solver/linear/quasi-newton';

const n = 12;
const curvatures = Float64Array.from({ length: n }, (_, i) => 1 + i * i);
const image = (x: Float64Array) => x.map((value, i) => curvatures[i]! * value);

// Nocedal and Wright 2006, eq. 7.18: the newest pair satisfies the secant condition H y = s.
it('maps the newest change of the gradient to its step', () => {
  const corrections = new QuasiNewton();
  for (let k = 0; k < 9; k++) {
    const step = Float64Array.from({ length: n }, (_, i) => Math.cos(3 * k + i * i));
    corrections.learn(step, image(step));
    const x = image(step);
    corrections.direct(x, (z) => z.forEach((value, i) => (z[i] = value / 5)));
    x.forEach((value, i) => expect(value).toBeCloseTo(step[i]!, 10));
  }
});

it('takes the plain inverse when nothing was learned, or only a step along which the energy curves the wrong way', () => {
  const corrections = new QuasiNewton();
  const step = new Float64Array(n).fill(1);
  corrections.learn(
    step,
    step.map((value) => -value),
  );
  const x = Float64Array.from({ length: n }, (_, i) => i);
  corrections.direct(x, (z) => z.forEach((value, i) => (z[i] = 2 * value)));
  x.forEach((value, i) => expect(value).toBe(2 * i));
});

/** A bowl with a quartic wall, and a factor that is wrong by up to a third. */
function bowl(): NewtonProblem & { refreshed: number } {
  const problem = {
    refreshed: 0,
    evaluate: (c: Float64Array, r: Float64Array) => {
      let energy = 0;
      for (let i = 0; i < n; i++) {
        const x = c[i]! - 1;
        energy += 0.5 * curvatures[i]! * x * x + 0.25 * x ** 4;
        r[i] = curvatures[i]! * x + x ** 3;
      }
      return energy;
    },
    worstJ: () => 1,
    refresh: () => {
      problem.refreshed++;
      return true;
    },
    solve: (x: Float64Array) => x.forEach((value, i) => (x[i] = value / (curvatures[i]! * (1 + (i % 4) / 9)))),
    stepped: () => undefined,
  };
  return problem;
}

it('brings a solve to its end on the factor of an earlier one', () => {
  const problem = bowl();
  const c = new Float64Array(n);
  const report = minimise(problem, c, new Float64Array(n), {
    tolerance: 1e-10,
    size: 1,
    maxSteps: 60,
    factor: 'lagged',
    keepFactor: true,
    trustFullSteps: false,
  });
  expect(report.converged).toBe(true);
  expect(problem.refreshed).toBe(0);
  c.forEach((value) => expect(value).toBeCloseTo(1, 9));
});

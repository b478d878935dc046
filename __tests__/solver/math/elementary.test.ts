import { angleOf, cubeRoot, naturalLog } from '../../../solver/math/elementary';
import { seededRandom } from '../../../solver/math/random';

// Against the engine's own functions, which are within a unit or two in the last place themselves.
const random = seededRandom(7);
const places = Array.from({ length: 4000 }, () => 2 ** (80 * random() - 40));
const UNIT = 2 ** -52;

it('natural logarithm', () => {
  for (const x of places)
    expect(Math.abs(naturalLog(x) - Math.log(x))).toBeLessThan(4 * UNIT * Math.max(1, Math.abs(Math.log(x))));
  for (let k = 0; k < 1000; k++) {
    const x = 0.3 + 1.7 * random();
    expect(Math.abs(naturalLog(x) - Math.log(x))).toBeLessThan(3 * UNIT);
  }
  expect([naturalLog(1), naturalLog(0), naturalLog(Infinity), naturalLog(-1)]).toEqual([0, -Infinity, Infinity, NaN]);
  // A tiny stretch loses no digits: ln(1 + x) = x − x²/2 + …
  const x = 2 ** -30;
  expect(naturalLog(1 + x)).toBeCloseTo(x - (x * x) / 2, 24);
});

it('cube root', () => {
  for (const x of places) expect(Math.abs(cubeRoot(x) / Math.cbrt(x) - 1)).toBeLessThan(3 * UNIT);
  expect([cubeRoot(0), cubeRoot(27), cubeRoot(1e-9)].map((y) => Number(y.toPrecision(15)))).toEqual([0, 3, 1e-3]);
});

it('angle of a point in all four quarters', () => {
  for (let k = 0; k < 4000; k++) {
    const [x, y] = [random() - 0.5, random() - 0.5];
    expect(Math.abs(angleOf(y, x) - Math.atan2(y, x))).toBeLessThan(6 * UNIT);
  }
  expect([angleOf(0, 1), angleOf(1, 0), angleOf(-1, 0), angleOf(0, -1), angleOf(0, 0)]).toEqual([
    0,
    Math.PI / 2,
    -Math.PI / 2,
    Math.PI,
    0,
  ]);
  expect(angleOf(1, 1)).toBeCloseTo(Math.PI / 4, 15);
});

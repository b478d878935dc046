/**
 * Elementary functions made of + − × ÷ and square roots alone, which IEEE 754 fixes to the bit. The engine's own
 * differ in the last bit from version to version (measured: log, cbrt, atan2 and pow of two releases of one engine),
 * and a bake must be the same bytes everywhere.
 */

const LN2 = 0.6931471805599453;

/** ln x for x > 0, within 2e-16 absolute near 1 and 2 units in the last place elsewhere. */
export function naturalLog(x: number): number {
  if (!(x > 0) || x === Infinity) return x === 0 ? -Infinity : x === Infinity ? Infinity : NaN;
  let m = x;
  let e = 0;
  while (m > Math.SQRT2) {
    m /= 2;
    e++;
  }
  while (m < Math.SQRT1_2) {
    m *= 2;
    e--;
  }
  // ln m = 2 artanh s, |s| ≤ 0.172
  const s = (m - 1) / (m + 1);
  const q = s * s;
  let sum = 0;
  for (let k = 23; k >= 3; k -= 2) sum = q * (1 / k + sum);
  return e * LN2 + 2 * (s + s * sum);
}

/** ∛x for x ≥ 0, within 2 units in the last place. */
export function cubeRoot(x: number): number {
  if (!(x > 0) || x === Infinity) return x;
  let m = x;
  let scale = 1;
  while (m >= 8) {
    m /= 8;
    scale *= 2;
  }
  while (m < 1) {
    m *= 8;
    scale /= 2;
  }
  let y = 0.7 + 0.3 * m - 0.02 * m * m;
  for (let k = 0; k < 6; k++) y = (2 * y + m / (y * y)) / 3;
  return scale * y;
}

/** The angle of (x, y) in −π … π, within 1e-15. */
export function angleOf(y: number, x: number): number {
  const a = Math.abs(x);
  const b = Math.abs(y);
  if (a === 0 && b === 0) return 0;
  // The angle from the nearer axis, 0 … π/4, halved twice: atan t = 2 atan(t / (1 + √(1 + t²))).
  let t = a > b ? b / a : a / b;
  t /= 1 + Math.sqrt(1 + t * t);
  t /= 1 + Math.sqrt(1 + t * t);
  const q = t * t;
  let sum = 0;
  for (let k = 23; k >= 3; k -= 2) sum = q * ((k % 4 === 1 ? 1 : -1) / k + sum);
  const near = 4 * (t + t * sum);
  const first = a > b ? near : Math.PI / 2 - near;
  const upper = x < 0 ? Math.PI - first : first;
  return y < 0 ? -upper : upper;
}

import type { Patch } from '../../solver/geometry/patch';

/** A wavy rational patch on clamped random knots; `random` gives numbers in [0, 1). */
export function randomPatch(
  random: () => number,
  degreeU: number,
  degreeV: number,
  countU: number,
  countV: number,
  scale = 1,
): Patch {
  const knots = (count: number, degree: number) => {
    const inner = Array.from({ length: count - degree - 1 }, () => 0.1 + 0.8 * random()).sort((a, b) => a - b);
    return Float64Array.from([
      ...new Array<number>(degree + 1).fill(0),
      ...inner,
      ...new Array<number>(degree + 1).fill(1),
    ]);
  };
  const points = new Float64Array(3 * countU * countV);
  for (let i = 0; i < countU; i++) {
    for (let j = 0; j < countV; j++) {
      const at = 3 * (i * countV + j);
      points[at] = scale * (i + 0.4 * random());
      points[at + 1] = scale * (j + 0.4 * random());
      points[at + 2] = scale * random();
    }
  }
  const weights = Float64Array.from({ length: countU * countV }, () => 0.5 + random());
  return {
    name: 'random',
    group: '',
    degreeU,
    degreeV,
    countU,
    countV,
    knotsU: knots(countU, degreeU),
    knotsV: knots(countV, degreeV),
    points,
    weights,
  };
}

import { clampedKnots } from '../geometry/shapes';
import { MAX_DEGREE } from '../geometry/basis-functions';
import type { Patch } from '../geometry/patch';
import { MAX_PATCHES, patchFault, type ImportResult } from './import-result';
import { UnreadableModelError } from './unreadable-model-error';

/**
 * Bézier-patch text: the number of patches; then for each its two degrees (u v) and (u+1)·(v+1) points, one
 * `x y z` a line, u-major. Blank lines are allowed. The text has no unit, names or weights.
 */
export function readBezierPatchText(text: string): ImportResult {
  const numbers = text.split(/\s+/);
  if (numbers[0] === '') numbers.shift();
  if (numbers[numbers.length - 1] === '') numbers.pop();
  let at = 0;
  const patches: Patch[] = [];
  const where = () =>
    `${patches.length === 1 ? '1 patch' : `${patches.length} patches`} could be read. Ask for the file again.`;
  const next = (): number => {
    if (at >= numbers.length) {
      throw new UnreadableModelError(`This file ends in the middle of patch ${patches.length + 1}. ${where()}`);
    }
    const word = numbers[at++]!;
    const value = Number(word);
    if (!Number.isFinite(value)) {
      throw new UnreadableModelError(
        `Patch ${patches.length + 1} has “${word.slice(0, 20)}” where a number belongs. ${where()}`,
      );
    }
    return value;
  };
  const declared = next();
  if (!Number.isInteger(declared) || declared < 1 || declared > MAX_PATCHES) {
    throw new UnreadableModelError(
      `The file says it holds ${declared} patches. A Bézier-patch file starts with a whole number from 1 to ${MAX_PATCHES}.`,
    );
  }
  while (patches.length < declared) {
    const degreeU = next();
    const degreeV = next();
    for (const degree of [degreeU, degreeV]) {
      if (!Number.isInteger(degree) || degree < 1 || degree > MAX_DEGREE) {
        throw new UnreadableModelError(
          `Patch ${patches.length + 1} has degree ${degree}; whole numbers from 1 to ${MAX_DEGREE} can be read. ${where()}`,
        );
      }
    }
    const count = (degreeU + 1) * (degreeV + 1);
    if (numbers.length - at < 3 * count) at = numbers.length;
    const points = Float64Array.from({ length: 3 * count }, next);
    const patch: Patch = {
      name: `patch ${patches.length + 1}`,
      group: '',
      degreeU,
      degreeV,
      countU: degreeU + 1,
      countV: degreeV + 1,
      knotsU: Float64Array.from(clampedKnots(degreeU + 1, degreeU)),
      knotsV: Float64Array.from(clampedKnots(degreeV + 1, degreeV)),
      points,
      weights: new Float64Array(count).fill(1),
    };
    const fault = patchFault(patch);
    if (fault) throw new UnreadableModelError(`Patch ${patches.length + 1} cannot be used: ${fault}. ${where()}`);
    patches.push(patch);
  }
  const remarks = at < numbers.length ? ['The file goes on after its last patch; the rest was not read.'] : [];
  return {
    format: 'bezier-patch-text',
    patches,
    report: { declared, imported: declared, skipped: [], remarks, declaredUnit: null },
  };
}

/** Writes polynomial single-span patches (weights 1, no inner knots); throws a RangeError on any other. */
export function writeBezierPatchText(patches: readonly Patch[]): string {
  const lines = [String(patches.length)];
  for (const patch of patches) {
    if (
      patch.countU !== patch.degreeU + 1 ||
      patch.countV !== patch.degreeV + 1 ||
      patch.weights.some((w) => w !== 1)
    ) {
      throw new RangeError(`“${patch.name}” is not a single polynomial Bézier patch.`);
    }
    lines.push(`${patch.degreeU} ${patch.degreeV}`);
    for (let k = 0; k < patch.points.length; k += 3) {
      lines.push(`${patch.points[k]} ${patch.points[k + 1]} ${patch.points[k + 2]}`);
    }
  }
  return lines.join('\n') + '\n';
}

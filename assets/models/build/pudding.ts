import type { Patch } from '../../../solver/geometry/patch';
import type { Vec3 } from '../../../solver/scene';
import { drawnCurve, fitSurface, smoothStep } from './surface-fit';

const SECTORS = 8;
const FLUTES_PER_SECTOR = 2;
/** Radius and height of the outline, mm: from the middle of the underside over the flank and the crown to the dimple. */
const OUTLINE = drawnCurve([
  [0, 0],
  [24, 0],
  [58, 0],
  [72.5, -0.5],
  [75, 8],
  [72.5, 24],
  [67.5, 50],
  [62.5, 73],
  [56.5, 93],
  [45, 102],
  [30, 104.5],
  [17, 102.5],
  [8, 99.8],
  [0, 99.8],
]);
/** Where the outline is cut into underside, flank and crown. */
const BANDS = [0, 0.3, 0.66, 1];
const BAND_NAMES = ['underside', 'flank', 'crown'];
const FLUTE_DEPTH = 7;
const SWIRL = (34 * Math.PI) / 180;
/** mm between the underside and the plate. */
const GAP = 0.5;

/** A fluted pudding of about 150 × 104 mm that floats half a millimetre above its plate. z up, mm. */
export function steamedPudding(): Patch[] {
  return [...pudding(), ...plate()];
}

function pudding(): Patch[] {
  const patches: Patch[] = [];
  for (let b = 0; b < 3; b++) {
    for (let k = 0; k < SECTORS; k++) {
      const surface = (u: number, v: number): Vec3 => {
        const t = BANDS[b]! + (BANDS[b + 1]! - BANDS[b]!) * v;
        return puddingPoint((k + u) / SECTORS, t);
      };
      patches.push(
        fitSurface(`${BAND_NAMES[b]} ${k + 1}`, 'pudding', surface, { countU: 19, countV: b === 1 ? 9 : 10 }),
      );
    }
  }
  return patches;
}

/** Flutes are rounded lobes that meet in soft valleys; they fade out under the base and on the crown. */
function puddingPoint(turn: number, t: number): Vec3 {
  const [radius, z] = OUTLINE(t) as [number, number];
  const depth = FLUTE_DEPTH * smoothStep(0.16, 0.36, t) * (1 - smoothStep(0.58, 0.92, t));
  const phase = Math.PI * turn * SECTORS * FLUTES_PER_SECTOR;
  const lobe = Math.sqrt(Math.sin(phase) ** 2 + 0.012) - 0.66;
  const twist = SWIRL * (smoothStep(0.1, 0.8, t) - 0.5);
  const angle = 2 * Math.PI * turn - twist;
  const r = radius + depth * lobe * Math.min(1, radius / 40);
  return [r * Math.cos(angle), r * Math.sin(angle), z + GAP];
}

/** Outline of the plate, mm, z = 0 where the pudding would rest: up the inside, over the rim, down to the foot. */
const PLATE_TOP = drawnCurve([
  [0, 0],
  [40, 0],
  [78, -0.2],
  [98, 0.5],
  [114, 7],
  [126, 14.5],
]);
const PLATE_RIM = drawnCurve([
  [126, 14.5],
  [129.5, 16.5],
  [131.5, 15],
  [129, 12.2],
]);
const PLATE_UNDER = drawnCurve([
  [129, 12.2],
  [114, 3],
  [100, -6],
  [84, -7],
  [82, -11],
  [74, -11.2],
  [72, -7.5],
  [62, -6.5],
  [24, -6.2],
  [0, -6.2],
]);

function plate(): Patch[] {
  const patches: Patch[] = [];
  const piece = (name: string, outline: (t: number) => number[], countV: number) => {
    for (let k = 0; k < 4; k++) {
      // The outline runs outwards on the top, so it is taken backwards for the normal to point up.
      const surface = (u: number, v: number): Vec3 => {
        const [r, z] = outline(1 - v) as [number, number];
        const angle = ((k + u) * Math.PI) / 2;
        return [r * Math.cos(angle), r * Math.sin(angle), z];
      };
      patches.push(fitSurface(`${name} ${k + 1}`, 'plate', surface, { countU: 9, countV }));
    }
  };
  piece('plate top', PLATE_TOP, 9);
  piece('plate rim', PLATE_RIM, 6);
  piece('plate underside', PLATE_UNDER, 16);
  return patches;
}

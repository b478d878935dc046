import { add, length, subtract } from '../../../solver/math/vec3';
import type { Patch } from '../../../solver/geometry/patch';
import type { Vec3 } from '../../../solver/scene';
import { drawnCurve, fitSurface } from './surface-fit';
import { DOME, domed, equalSectors, sweepPatches } from './sweeps';

type Outline = (v: number) => readonly number[];

const LEGS = 4;
const BOLTS = 8;
const DECK = 470;
const PLATFORM = 1490;

/**
 * A bell buoy of many small pieces that overlap or stand free: float, cage of four legs and two hoops, platform with
 * lantern, bell with clapper, deck bolts, mooring eye, and a collar that is a sheet without thickness. Every patch is a
 * single polynomial Bézier patch. z up, mm.
 */
export function bellBuoy(): Patch[] {
  return [
    ...float(),
    ...collar(),
    ...Array.from({ length: LEGS }, (_, k) => leg(k)).flat(),
    ...hoop(840, 268, 17),
    ...hoop(1180, 199, 15),
    ...platform(),
    ...bell(),
    ...Array.from({ length: BOLTS }, (_, k) => bolt(k)).flat(),
    ...ring([0, 0, -56], 62, 16),
  ];
}

/** Quarter patches of an outline (radius, z) turned about the z axis; outward when the outline climbs on the outside. */
function turned(outline: Outline, degreeV: number, centre: Vec3 = [0, 0, 0]): Patch[] {
  return Array.from({ length: 4 }, (_, k) =>
    fitSurface(
      'piece',
      '',
      (u, v) => {
        const [r, z] = outline(v) as [number, number];
        const angle = ((k + u) * Math.PI) / 2;
        return add(centre, [r * Math.cos(angle), r * Math.sin(angle), z]);
      },
      { countU: 6, degreeU: 5, countV: degreeV + 1, degreeV },
    ),
  );
}

const line = (...points: [number, number][]): Outline => drawnCurve(points);

function float(): Patch[] {
  return [
    ...turned(line([0, 0], [150, 0], [280, 30], [350, 80]), 3),
    ...turned(line([350, 80], [420, 130], [450, 180], [450, 240]), 3),
    ...turned(line([450, 240], [450, 290], [450, 330], [436, 372]), 3),
    ...turned(line([436, 372], [428, 396], [404, 420], [360, 430]), 3),
    ...turned(line([360, 430], [300, 444], [120, DECK], [0, DECK]), 3),
  ];
}

/** The collar: one layer of sheet round the float's waist, its inner rim 3 mm off the float. */
function collar(): Patch[] {
  const skirt = (v: number) => {
    // From the outer rim inwards, so that the sheet faces up.
    const out = 1 - v;
    return [453 + 170 * out, 262 + 22 * Math.sin(Math.PI * out) - 40 * out * out];
  };
  return turned(skirt, 4);
}

function leg(k: number): Patch[] {
  const angle = ((k + 0.5) / LEGS) * 2 * Math.PI;
  const at = (r: number, z: number): Vec3 => [r * Math.cos(angle), r * Math.sin(angle), z];
  return rod(at(345, DECK - 60), at(140, PLATFORM - 8), 24);
}

/** A straight round bar with domed ends. */
function rod(from: Vec3, to: Vec3, radius: number): Patch[] {
  const bar = domed(radius / length(subtract(to, from)));
  return sweepPatches({
    name: 'piece',
    group: '',
    spine: (s) => [from[0] + (to[0] - from[0]) * s, from[1] + (to[1] - from[1]) * s, from[2] + (to[2] - from[2]) * s],
    up: [0.3, 1, 0.1],
    section: (phi, _s, t) => {
      const r = radius * bar.radius(t);
      return [r * Math.cos(phi), r * Math.sin(phi)];
    },
    sectors: equalSectors(4),
    bands: [0, DOME, 1 - DOME, 1],
    place: bar.place,
    fit: { countU: 6, degreeU: 5, countV: 6, degreeV: 5 },
  });
}

/** A torus of round bar, major radius `radius`, lying flat at height z. */
function hoop(z: number, radius: number, bar: number): Patch[] {
  return torus((turn, x, y): Vec3 => {
    const r = radius + x;
    return [r * Math.cos(turn), r * Math.sin(turn), z + y];
  }, bar);
}

/** A torus of round bar standing upright round the y axis. */
function ring(centre: Vec3, radius: number, bar: number): Patch[] {
  return torus((turn, x, y) => {
    const r = radius + x;
    return add(centre, [r * Math.cos(turn), -y, r * Math.sin(turn)]);
  }, bar);
}

function torus(place: (turn: number, x: number, y: number) => Vec3, bar: number): Patch[] {
  const patches: Patch[] = [];
  for (let k = 0; k < 4; k++) {
    for (let m = 0; m < 2; m++) {
      const surface = (u: number, v: number) => {
        const phi = (m + v) * Math.PI;
        return place(((k + u) * Math.PI) / 2, bar * Math.cos(phi), bar * Math.sin(phi));
      };
      patches.push(fitSurface('piece', '', surface, { countU: 6, degreeU: 5, countV: 8, degreeV: 7 }));
    }
  }
  return patches;
}

function platform(): Patch[] {
  const z = PLATFORM;
  const cone = [
    ...turned(line([0, z - 16], [80, z - 16], [150, z - 16], [182, z - 14]), 3),
    ...turned(line([182, z - 14], [196, z - 12], [196, z + 10], [182, z + 12]), 3),
    ...turned(line([182, z + 12], [150, z + 14], [92, z + 20], [0, z + 20]), 3),
  ];
  const lantern = [
    ...turned(line([0, z + 6], [30, z + 6], [52, z + 6], [60, z + 10]), 3),
    ...turned(line([60, z + 10], [74, z + 60], [74, z + 110], [62, z + 158]), 3),
    ...turned(line([62, z + 158], [104, z + 160], [104, z + 176], [70, z + 192]), 3),
    ...turned(line([70, z + 192], [40, z + 210], [16, z + 232], [0, z + 232]), 3),
  ];
  return [...cone, ...lantern];
}

/** Bell with its shaft and clapper. */
function bell(): Patch[] {
  const crown = 1120;
  const mouth = 800;
  const shell = [
    ...turned(line([172, mouth], [140, mouth + 54], [116, mouth + 110], [106, mouth + 190]), 3),
    ...turned(line([106, mouth + 190], [98, crown - 60], [96, crown], [0, crown]), 3),
    ...turned(line([0, crown - 22], [80, crown - 22], [84, crown - 70], [92, mouth + 180]), 3),
    ...turned(line([92, mouth + 180], [102, mouth + 100], [124, mouth + 52], [160, mouth - 4]), 3),
    ...turned(line([160, mouth - 4], [164, mouth - 8], [172, mouth - 8], [172, mouth]), 3),
  ];
  return [
    ...shell,
    ...rod([0, 0, crown - 14], [0, 0, PLATFORM - 4], 18),
    ...rod([0, 0, mouth - 20], [0, 0, crown - 12], 9),
    ...ball([0, 0, mouth - 16], 40),
  ];
}

function bolt(k: number): Patch[] {
  const angle = ((k + 0.25) / BOLTS) * 2 * Math.PI;
  return ball([250 * Math.cos(angle), 250 * Math.sin(angle), 462], 19);
}

function ball(centre: Vec3, radius: number): Patch[] {
  const half = (from: number) => (v: number) => {
    const angle = (Math.PI / 2) * (from + v);
    return [radius * Math.cos(angle), radius * Math.sin(angle)];
  };
  return [...turned(half(-1), 5, centre), ...turned(half(0), 5, centre)];
}

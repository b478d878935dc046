import { flipPatch } from '../../../solver/geometry/transform';
import { shapePatches } from '../../../solver/geometry/shapes';
import { add } from '../../../solver/math/vec3';
import type { Patch } from '../../../solver/geometry/patch';
import type { Vec3 } from '../../../solver/scene';
import { drawnCurve, smoothStep } from './surface-fit';
import { DOME, domed, equalSectors, roundBoth, roundEnd, sweepPatches } from './sweeps';

/** mm between the strips of the tail that were never welded. */
const TAIL_GAP = 1.2;
/** mm of air between each leg and its foot. */
const FOOT_GAP = 8;

/**
 * A parade balloon in the shape of a gull, about 1.8 m from beak to tail. x forward, y to the left, z up, mm, ground at
 * z = 0. Made as such models arrive: the neck, head, wings and tail are pushed in without trimming, the beak is
 * open, the tail has three tiny gaps, the feet touch nothing, one patch of the left wing faces inwards.
 */
export function paradeGull(): Patch[] {
  return [...body(), ...neck(), ...head(), ...beak(), ...wing(1), ...wing(-1), ...tail(), ...leg(1), ...leg(-1)];
}

/** How far a welded film bulges between two seams, 0 at the seams and 1 half-way. */
const bulge = (x: number) => Math.sin(Math.PI * (x - Math.floor(x)));
const vec = (numbers: number[]): Vec3 => [numbers[0]!, numbers[1]!, numbers[2]!];
const curve3 = (points: Vec3[]) => {
  const draw = drawnCurve(points);
  return (s: number): Vec3 => vec(draw(s));
};

function body(): Patch[] {
  const gores = 8;
  const spine = curve3([
    [-640, 0, 640],
    [-400, 0, 660],
    [-60, 0, 650],
    [260, 0, 720],
    [500, 0, 810],
  ]);
  const width = drawnCurve([[70], [190], [330], [330], [250], [150]]);
  const height = drawnCurve([[60], [150], [280], [300], [250], [150]]);
  return sweepPatches({
    name: 'body',
    group: 'body',
    spine,
    up: [0, 0, 1],
    section: (phi, s, t) => {
      const cap = Math.sin(Math.PI * t) ** 0.9;
      const puff = 1 + 0.055 * bulge((phi / (2 * Math.PI)) * gores);
      const belly = Math.sin(phi) < 0 ? 1.12 : 1;
      return [width(s)[0]! * cap * puff * Math.cos(phi), height(s)[0]! * belly * cap * puff * Math.sin(phi)];
    },
    sectors: equalSectors(gores),
    bands: [0, 0.5, 1],
    place: roundBoth,
    fit: { countU: 7, countV: 11 },
  });
}

function neck(): Patch[] {
  const rings = 4;
  return sweepPatches({
    name: 'neck',
    group: 'neck',
    spine: curve3([
      [330, 0, 760],
      [450, 0, 900],
      [560, 0, 1020],
      [580, 0, 1140],
      [620, 0, 1260],
    ]),
    up: [-1, 0, 0.4],
    section: (phi, s, t) => {
      const r = (215 - 75 * smoothStep(0, 1, s)) * Math.sin(Math.PI * t) ** 0.7 * (1 + 0.1 * bulge(t * rings));
      return [r * Math.cos(phi), r * Math.sin(phi)];
    },
    sectors: equalSectors(2, 0.25),
    bands: [0, 0.25, 0.5, 0.75, 1],
    place: roundBoth,
    fit: { countU: 11, countV: 9 },
  });
}

const HEAD: Vec3 = [655, 0, 1300];

function head(): Patch[] {
  const skull = sweepPatches({
    name: 'head',
    group: 'head',
    spine: (s) => add(HEAD, [-190 + 390 * s, 0, -6 + 22 * Math.sin(Math.PI * s)]),
    up: [0, 0, 1],
    section: (phi, s, t) => {
      const r = 182 * Math.sin(Math.PI * t) * (1 + 0.04 * bulge((phi / (2 * Math.PI)) * 4)) * (1 - 0.16 * s);
      return [r * Math.cos(phi), r * Math.sin(phi) * 1.02];
    },
    sectors: equalSectors(4),
    bands: [0, 1],
    place: roundBoth,
    fit: { countU: 9, countV: 15 },
  });
  const eyes = ([1, -1] as const).flatMap((side) =>
    shapePatches({ kind: 'sphere', centre: add(HEAD, [82, side * 136, 52]), radius: 27 }).map((patch) => ({
      ...patch,
      name: side > 0 ? 'left eye' : 'right eye',
      group: 'eyes',
    })),
  );
  return [...skull, ...eyes];
}

/** Two half-open mandibles; the rims at their roots lie free inside the head. */
function beak(): Patch[] {
  const mandible = (name: string, spine: (s: number) => Vec3, width: number, height: number) =>
    sweepPatches({
      name,
      group: 'beak',
      spine,
      up: [0, 0, 1],
      section: (phi, _s, t) => {
        const r = Math.cos((Math.PI / 2) * t) ** 0.85;
        return [width * r * Math.cos(phi), height * r * Math.sin(phi)];
      },
      sectors: equalSectors(2),
      bands: [0, 1],
      place: roundEnd,
      fit: { countU: 9, countV: 11 },
    });
  return [
    ...mandible('upper beak', curve3([[770, 0, 1306], [860, 0, 1328], [955, 0, 1314], [985, 0, 1226]]), 70, 50),
    ...mandible('lower beak', curve3([[706, 0, 1262], [800, 0, 1238], [890, 0, 1188], [918, 0, 1146]]), 56, 30),
  ];
}

function wing(side: 1 | -1): Patch[] {
  const name = side > 0 ? 'left wing' : 'right wing';
  const ribs = 7;
  const patches = sweepPatches({
    name,
    group: name,
    spine: (s) => {
      const p = WING_SPINE(s);
      return [p[0], side * p[1], p[2]];
    },
    up: [0, 0, 1],
    section: (phi, s, t) => {
      const puff = 0.72 + 0.3 * bulge(t * ribs);
      const cap = Math.sin(Math.PI * Math.min(1, t)) ** 0.72;
      const chord = WING_CHORD(s)[0]! * cap * (0.9 + 0.1 * bulge(t * ribs));
      const thickness = WING_THICKNESS(s)[0]! * cap * puff;
      // Blunt in front and thin behind, like a wing; "front" is −x of the section on the left and +x on the right.
      const x = Math.cos(phi);
      const front = side > 0 ? x : -x;
      return [chord * x, thickness * Math.sin(phi) * (0.72 + 0.28 * front)];
    },
    sectors: [0, 0.5, 1],
    bands: Array.from({ length: ribs + 1 }, (_, k) => k / ribs),
    place: roundBoth,
    fit: { countU: 11, countV: 7 },
  });
  const inward = patches.findIndex((patch) => patch.name === 'left wing 10');
  return patches.map((patch, k) => (k === inward ? flipPatch(patch) : patch));
}

const WING_SPINE = curve3([
  [150, 20, 800],
  [160, 260, 920],
  [90, 520, 1110],
  [-110, 800, 1200],
  [-390, 960, 1140],
]);
const WING_CHORD = drawnCurve([[200], [240], [265], [235], [190], [110]]);
const WING_THICKNESS = drawnCurve([[96], [112], [104], [80], [60], [44]]);

/** A flat fan in four strips: three of the four seams stay open by a hair. */
function tail(): Patch[] {
  const strips = sweepPatches({
    name: 'tail',
    group: 'tail',
    spine: curve3([
      [-470, 0, 660],
      [-620, 0, 680],
      [-780, 0, 715],
      [-900, 0, 760],
    ]),
    up: [0, 0, 1],
    section: (phi, s, t) => {
      const cap = Math.sin(Math.PI * t) ** 0.6;
      const spread = 105 + 130 * smoothStep(0, 1, s);
      const scallop = 1 + 0.1 * bulge((phi / (2 * Math.PI)) * 4);
      return [spread * cap * Math.cos(phi), (78 - 40 * s) * cap * scallop * Math.sin(phi)];
    },
    sectors: equalSectors(4),
    bands: [0, 1],
    place: roundBoth,
    fit: { countU: 9, countV: 11 },
  });
  // Strips move apart along the seam between them; the last two stay together.
  const offsets: Vec3[] = [
    [0, 0, TAIL_GAP],
    [0, -TAIL_GAP, 0],
    [0, 0, -TAIL_GAP],
    [0, 0, -TAIL_GAP],
  ];
  return strips.map((patch, k) => moved(patch, offsets[k]!));
}

function leg(side: 1 | -1): Patch[] {
  const name = side > 0 ? 'left' : 'right';
  const y = side * 128;
  const top = 420;
  const footTop = 46;
  const ground = 1;
  const bar = domed(0.09);
  const shank = sweepPatches({
    name: `${name} leg`,
    group: 'legs',
    spine: (s) => [40 + 34 * s, y, top - (top - footTop - ground - FOOT_GAP) * s],
    up: [0, 1, 0],
    section: (phi, s, t) => {
      const r = (40 - 10 * s) * bar.radius(t);
      return [r * Math.cos(phi), r * Math.sin(phi)];
    },
    sectors: equalSectors(2),
    bands: [0, DOME, 1 - DOME, 1],
    place: bar.place,
    fit: { countU: 9, countV: 6 },
  });
  const foot = sweepPatches({
    name: `${name} foot`,
    group: 'feet',
    spine: (s) => [-40 + 290 * s, y * (1 + 0.2 * s), footTop / 2 + ground],
    up: [0, 0, 1],
    section: (phi, s, t) => {
      const cap = Math.sin(Math.PI * t) ** 0.7;
      return [(52 + 62 * s) * cap * Math.cos(phi), (footTop / 2) * cap * Math.sin(phi)];
    },
    sectors: equalSectors(2),
    bands: [0, 1],
    place: roundBoth,
    fit: { countU: 11, countV: 11 },
  });
  return [...shank, ...foot];
}

function moved(patch: Patch, offset: Vec3): Patch {
  return { ...patch, points: patch.points.map((x, i) => Math.round((x + offset[i % 3]!) * 1e6) / 1e6) };
}

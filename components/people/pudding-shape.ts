/** The steamed pudding and its plate as shaded facets of one picture: x right, y down, mm; seen from 20° above. */

const VIEW = (20 * Math.PI) / 180;
const TURNS = 192;
const FLUTES = 16;
const FLUTE_DEPTH = 7;
const SWIRL = 0.5;
/** Key light from the upper left, and how much of the light is open sky (x right, y up, z to the viewer). */
const KEY = [-0.42, 0.6, 0.68] as const;
const SKY = 0.54;
export const SHADES = 72;

type Point = readonly [number, number, number];

/** Radius and height, mm, from the foot of the flank over the crown into the dimple. */
const PUDDING: readonly (readonly [number, number])[] = [
  [72, 0],
  [75, 6],
  [73, 20],
  [69, 42],
  [64, 66],
  [58, 88],
  [49, 100],
  [38, 104.3],
  [26, 104],
  [15, 101],
  [0, 99.8],
];
/** The plate from its foot over the outside and the rim to the middle of the inside. */
const PLATE: readonly (readonly [number, number])[] = [
  [82, -11],
  [86, -7],
  [102, -5],
  [116, 3],
  [129, 12.5],
  [131.5, 15],
  [129.5, 16.5],
  [126, 14.5],
  [114, 7],
  [98, 0.5],
  [78, -0.2],
  [0, 0],
];

/** Point of an outline at t in 0…1, by cubic Catmull–Rom pieces (E. Catmull, R. Rom, 1974). */
function along(outline: readonly (readonly [number, number])[], t: number): [number, number] {
  const last = outline.length - 1;
  const k = Math.min(last - 1, Math.floor(t * last));
  const s = t * last - k;
  const at = (i: number, d: 0 | 1) => outline[Math.max(0, Math.min(last, i))]![d];
  const piece = (d: 0 | 1) => {
    const [a, b, c, e] = [at(k - 1, d), at(k, d), at(k + 1, d), at(k + 2, d)];
    return b + 0.5 * s * (c - a + s * (2 * a - 5 * b + 4 * c - e + s * (3 * (b - c) + e - a)));
  };
  return [piece(0), piece(1)];
}

const ramp = (from: number, to: number, t: number): number => {
  const s = Math.max(0, Math.min(1, (t - from) / (to - from)));
  return s * s * (3 - 2 * s);
};

function puddingPoint(turn: number, t: number): Point {
  const [radius, z] = along(PUDDING, t);
  const depth = FLUTE_DEPTH * ramp(0, 0.2, t) * (1 - ramp(0.45, 0.85, t));
  const lobe = Math.sqrt(Math.sin(Math.PI * turn * FLUTES) ** 2 + 0.012) - 0.66;
  const angle = 2 * Math.PI * turn - SWIRL * (t - 0.3);
  const r = radius + depth * lobe;
  return [r * Math.cos(angle), r * Math.sin(angle), z];
}

function platePoint(turn: number, t: number): Point {
  const [r, z] = along(PLATE, t);
  return [r * Math.cos(2 * Math.PI * turn), r * Math.sin(2 * Math.PI * turn), z];
}

/** To the picture: x right, y up, z towards the viewer. */
const seen = ([x, y, z]: Point): Point => [
  x,
  z * Math.cos(VIEW) + y * Math.sin(VIEW),
  z * Math.sin(VIEW) - y * Math.cos(VIEW),
];

/** Facets that face the viewer as one path for each shade, darkest first; empty shades are ''. */
function shaded(surface: (turn: number, t: number) => Point, rows: number): string[] {
  const paths = Array.from({ length: SHADES }, () => '');
  for (let j = 0; j < rows; j++) {
    for (let i = 0; i < TURNS; i++) {
      const corners = [
        seen(surface(i / TURNS, j / rows)),
        seen(surface((i + 1) / TURNS, j / rows)),
        seen(surface((i + 1) / TURNS, (j + 1) / rows)),
        seen(surface(i / TURNS, (j + 1) / rows)),
      ] as const;
      const n = normal(corners);
      if (n[2] <= 0) continue;
      const key = Math.max(0, n[0] * KEY[0] + n[1] * KEY[1] + n[2] * KEY[2]);
      const light = SKY * (0.62 + 0.38 * n[1]) + (1 - SKY) * 1.15 * key;
      const shade = Math.max(0, Math.min(SHADES - 1, Math.round(light * (SHADES - 1))));
      paths[shade] += `M${corners.map(([x, y]) => `${x.toFixed(1)} ${(-y).toFixed(1)}`).join('L')}z`;
    }
  }
  return paths;
}

/** Outward unit normal of a facet from its diagonals. */
function normal([a, b, c, d]: readonly [Point, Point, Point, Point]): Point {
  const p = [c[0] - a[0], c[1] - a[1], c[2] - a[2]] as const;
  const q = [d[0] - b[0], d[1] - b[1], d[2] - b[2]] as const;
  const n = [p[1] * q[2] - p[2] * q[1], p[2] * q[0] - p[0] * q[2], p[0] * q[1] - p[1] * q[0]] as const;
  const size = Math.hypot(...n) || 1;
  return [n[0] / size, n[1] / size, n[2] / size];
}

export interface PuddingPicture {
  pudding: string[];
  plate: string[];
  /** mm, measured on the shape: overall width and height of the pudding, width of the plate */
  width: number;
  height: number;
  plateWidth: number;
  /** picture y of the crown's edge and of the foot, at the silhouette */
  top: number;
  foot: number;
}

export function puddingPicture(): PuddingPicture {
  let reach = 0;
  let height = 0;
  for (let j = 0; j <= 60; j++) {
    for (let i = 0; i < TURNS; i++) {
      const [x, , z] = puddingPoint(i / TURNS, j / 60);
      reach = Math.max(reach, Math.abs(x));
      height = Math.max(height, z);
    }
  }
  return {
    pudding: shaded(puddingPoint, 44),
    plate: shaded(platePoint, 33),
    width: 2 * reach,
    height,
    plateWidth: 263,
    top: -height * Math.cos(VIEW),
    foot: 0,
  };
}

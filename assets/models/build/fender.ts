import type { Patch } from '../../../solver/geometry/patch';
import type { Vec3 } from '../../../solver/scene';
import { drawnCurve, fitSurface } from './surface-fit';
import { capPatch, equalSectors, straight, sweepPatches, type Sweep } from './sweeps';

const SECTORS = 4;
const ROD_RADIUS = 45;
const ROD_HALF = 520;
/** mm of clearance between the rod and the bore. */
const CLEARANCE = 1;
const BORE = ROD_RADIUS + CLEARANCE;
const HALF_LENGTH = 450;
const BELT_COUNT = 5;

/**
 * A quay fender: a rubber barrel of 900 mm length and 600 mm thickness with a bore, a stiff rod through it, and two
 * strap loops whose legs are jammed into the barrel's ends without trimming. Axis along x, z up, mm.
 */
export function quayFender(): Patch[] {
  return [...barrel(), ...rod(), ...strap('strap a', -1), ...strap('strap b', 1)];
}

/** Radius of the outside at the place x: a cask with moulded belts. */
function outside(x: number): number {
  const cask = 300 - 46 * (x / HALF_LENGTH) ** 2;
  const belt = Math.cos((Math.PI * BELT_COUNT * x) / HALF_LENGTH / 1.08);
  return cask - 8 + 8 * Math.tanh(2.2 * belt);
}

function barrel(): Patch[] {
  const edge = 405;
  const shoulder = outside(edge);
  const end = drawnCurve([
    [edge, shoulder],
    [edge + 22, shoulder - 4],
    [HALF_LENGTH - 2, shoulder - 22],
    [HALF_LENGTH + 4, 200],
    [HALF_LENGTH - 6, 165],
    [HALF_LENGTH - 26, 120],
    [HALF_LENGTH - 24, 88],
    [HALF_LENGTH - 6, 76],
    [HALF_LENGTH - 4, 62],
    [HALF_LENGTH - 10, BORE],
  ]);
  const inner = end(1)[0]!;
  return [
    ...revolved('barrel side', 'barrel', (v) => [-edge + 2 * edge * v, outside(-edge + 2 * edge * v)], 33),
    ...revolved('barrel end b', 'barrel', (v) => [end(v)[0]!, end(v)[1]!], 13),
    ...revolved('bore', 'barrel', (v) => [inner - 2 * inner * v, BORE], 4),
    ...revolved('barrel end a', 'barrel', (v) => [-end(1 - v)[0]!, end(1 - v)[1]!], 13),
  ];
}

function rod(): Patch[] {
  const chamfer = 8;
  return [
    ...revolved('rod end a', 'rod', drawnPair([[-ROD_HALF, 0], [-ROD_HALF, 20], [-ROD_HALF, ROD_RADIUS - chamfer]]), 4),
    ...revolved('rod edge a', 'rod', drawnPair([[-ROD_HALF, ROD_RADIUS - chamfer], [-ROD_HALF, ROD_RADIUS], [-ROD_HALF + chamfer, ROD_RADIUS]]), 4),
    ...revolved('rod side', 'rod', (v) => [(ROD_HALF - chamfer) * (2 * v - 1), ROD_RADIUS], 6),
    ...revolved('rod edge b', 'rod', drawnPair([[ROD_HALF - chamfer, ROD_RADIUS], [ROD_HALF, ROD_RADIUS], [ROD_HALF, ROD_RADIUS - chamfer]]), 4),
    ...revolved('rod end b', 'rod', drawnPair([[ROD_HALF, ROD_RADIUS - chamfer], [ROD_HALF, 20], [ROD_HALF, 0]]), 4),
  ];
}

function drawnPair(points: [number, number][]): (v: number) => [number, number] {
  const draw = drawnCurve(points);
  return (v) => [draw(v)[0]!, draw(v)[1]!];
}

/** Quarter patches of an outline (x, radius) turned about the x axis, facing away from it where x grows. */
function revolved(name: string, group: string, outline: (v: number) => [number, number], countV: number): Patch[] {
  return Array.from({ length: SECTORS }, (_, k) =>
    fitSurface(
      `${name} ${k + 1}`,
      group,
      (u, v): Vec3 => {
        const [x, r] = outline(v);
        const angle = (2 * Math.PI * (k + u)) / SECTORS;
        return [x, r * Math.cos(angle), r * Math.sin(angle)];
      },
      { countU: 9, countV },
    ),
  );
}

/** A broad band bent to a U; its legs end inside the rubber. */
function strap(name: string, end: 1 | -1): Patch[] {
  const reach = 150;
  const from = HALF_LENGTH - 130;
  const legLength = 190;
  const half = (Math.PI * reach) / 2;
  const whole = 2 * (legLength + half);
  const spine = (s: number): Vec3 => {
    const at = s * whole;
    const x = (d: number) => end * d;
    if (at <= legLength) return [x(from + at), 0, -reach];
    if (at >= whole - legLength) return [x(from + whole - at), 0, reach];
    const angle = (at - legLength) / reach - Math.PI / 2;
    return [x(from + legLength + reach * Math.cos(angle) * 0.95), 0, reach * Math.sin(angle)];
  };
  const sweep: Sweep = {
    name,
    group: 'strap',
    spine,
    up: [0, 1, 0],
    section: (phi) => [21 * rounded(Math.cos(phi)), 58 * rounded(Math.sin(phi))],
    sectors: equalSectors(4, 0.125),
    bands: [0, legLength / whole, 0.5, 1 - legLength / whole, 1],
    place: straight,
    fit: { countU: 9, countV: 11 },
  };
  return [...sweepPatches(sweep), ...strapEnds(sweep)];
}

/** Between a circle's and a square's coordinate: a band with soft corners. */
const rounded = (x: number) => Math.sign(x) * Math.abs(x) ** 0.6;

function strapEnds(sweep: Sweep): Patch[] {
  return [false, true].flatMap((atEnd) =>
    sweep.sectors.slice(1).map((to, k) => {
      const sector = { ...sweep, name: `${sweep.name} end ${k + 1}`, sectors: [sweep.sectors[k]!, to] };
      return capPatch(sector, atEnd);
    }),
  );
}

import type { Patch } from '../geometry/patch';
import type { FinePoints } from './fine-points';
import type { Inside } from './inside';
import type { Piece } from './pieces';
import { rayPlace } from './rays/lattice';
import { areaOf, type TriangleSoup } from './rays/soup';
import { patchPlaces } from './samples';

/** Thickness proposed for a shell without an inside, as a share of the model's diagonal. */
export const SHEET_THICKNESS = 0.01;

/** A piece this thin for its area (mean chord over the root of the area) may be a sheet. */
const THIN = 0.08;
/** … and this thin it is flat, closed or not. */
const FLAT = 1e-6;
/** Inside a body that is closed but for gaps the winding number is near 1; next to a bare sheet it is near ½. */
const FAINT = 0.58;
const LOOKS = 150;

/** Is this piece a sheet: does it enclose nothing, or, when it is open, only the sliver beside a bent sheet? */
export function isSheet(soup: TriangleSoup, piece: Piece, inside: Inside): boolean {
  const area = areaOf(soup, piece.triangles);
  const chord = (2 * inside.volume) / area;
  if (chord <= FLAT * Math.sqrt(area)) return true;
  if (piece.closed || chord > THIN * Math.sqrt(area)) return false;
  let sum = 0;
  let looks = 0;
  const place = new Float64Array(2);
  const point = new Float64Array(3);
  for (const { lattice, intervals } of inside.sweeps) {
    const stride = Math.max(1, Math.floor((3 * intervals.count) / LOOKS));
    for (let n = 0; n < intervals.count; n += stride) {
      rayPlace(place, lattice, intervals.ray[n]!);
      point[lattice.axis] = 0.5 * (intervals.from[n]! + intervals.to[n]!);
      point[lattice.u] = place[0]!;
      point[lattice.v] = place[1]!;
      sum += piece.winding(point[0]!, point[1]!, point[2]!);
      looks++;
    }
  }
  return looks === 0 || sum / looks < FAINT;
}

/**
 * Fine points of a sheet of thickness t (m): two layers at ± t/(2√3) along the normals, where the
 * two-point Gauss rule puts them (± t/2 would be three times too stiff in bending), over about
 * `count` places of its patches.
 */
export function sheetPoints(patches: readonly Patch[], piece: Piece, thickness: number, count: number): FinePoints {
  const own = Array.from(piece.patches, (k) => patches[k]!);
  const places = patchPlaces(own, count, 64);
  const n = places.count;
  const positions = new Float64Array(6 * n);
  const volumes = new Float64Array(2 * n);
  const offset = thickness / (2 * Math.sqrt(3));
  for (let s = 0; s < n; s++) {
    for (let d = 0; d < 3; d++) {
      const shift = offset * places.normals[3 * s + d]!;
      positions[6 * s + d] = places.positions[3 * s + d]! + shift;
      positions[6 * s + 3 + d] = places.positions[3 * s + d]! - shift;
    }
    volumes[2 * s] = volumes[2 * s + 1] = 0.5 * thickness * places.areas[s]!;
  }
  return { count: 2 * n, positions, volumes };
}

/**
 * Share of the stabilisation form that a sheet of thickness t keeps when its parts' polynomials are
 * scaled by h: 0.1 (t/h)², at most 1. Bending resists with t², so the form of a solid (in proportion
 * to 1/h²) holds a sheet stiff: a strip with t/L = .01 deflected .27 to .65 of beam theory with the
 * whole form, .81 to .97 with a tenth, 1.00 to 1.02 with a hundredth.
 */
export function sheetStabilisation(thickness: number, scale: number): number {
  return Math.min(1, 0.1 * (thickness / scale) ** 2);
}

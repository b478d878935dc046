import type { BasisField } from '../weights/basis-field';
import { boxesMeet, type Piece } from './pieces';
import type { Ties } from './prepared';
import { nearestOnTriangles, triangleGrid } from './rays/nearest';
import { scatterOnTriangles } from './rays/scatter';
import { areaOf, type TriangleSoup } from './rays/soup';
import { RowBuilder } from './rows';

/** Where two bodies are held together, before the basis is known there. */
export interface TiePlaces {
  count: number;
  /** 3 · count, m */
  positions: Float64Array;
  /** count, m² */
  areas: Float64Array;
  bodyA: Int32Array;
  bodyB: Int32Array;
}

/** Faces of unlike materials this close (share of the diagonal) are touching. */
const TOUCH = 5e-4;
/** Probes on the smaller surface; once more, denser, where few of them found a partner. */
const PROBES = 800;
const DENSER = 8;
const FEW = 40;

/**
 * Bodies of unlike material are tied where they overlap or touch, and any two bodies where they are
 * closer than the bond distance (m). The interface of an overlap is the surface, inside the other,
 * of the body that the other yields to (`yields` of overlapOrder).
 */
export function findTies(
  soup: TriangleSoup,
  pieces: readonly Piece[],
  yields: readonly number[][],
  bondDistance: number,
  diagonal: number,
): TiePlaces {
  const positions: number[] = [];
  const areas: number[] = [];
  const bodyA: number[] = [];
  const bodyB: number[] = [];
  for (let a = 0; a < pieces.length; a++) {
    for (let b = a + 1; b < pieces.length; b++) {
      const unlike = pieces[a]!.material !== pieces[b]!.material;
      const reach = Math.max(unlike ? TOUCH * diagonal : 0, bondDistance);
      if (reach === 0 || !boxesMeet(pieces[a]!.bounds, pieces[b]!.bounds, reach)) continue;
      const [winner, other] = yields[b]!.includes(a) ? [a, b] : [b, a];
      let found = unlike ? probe(soup, pieces[winner]!, pieces[other]!, reach, true) : [];
      if (found.length === 0) {
        const [small, large] =
          areaOf(soup, pieces[a]!.triangles) < areaOf(soup, pieces[b]!.triangles) ? [a, b] : [b, a];
        found = probe(soup, pieces[small]!, pieces[large]!, reach, false);
      }
      for (const { x, y, z, area } of found) {
        positions.push(x, y, z);
        areas.push(area);
        bodyA.push(a);
        bodyB.push(b);
      }
    }
  }
  return {
    count: areas.length,
    positions: Float64Array.from(positions),
    areas: Float64Array.from(areas),
    bodyA: Int32Array.from(bodyA),
    bodyB: Int32Array.from(bodyB),
  };
}

interface TiePlace {
  x: number;
  y: number;
  z: number;
  area: number;
}

/** Places of one piece's surface within reach of another, at half the gap; or, on request, inside the other. */
function probe(soup: TriangleSoup, piece: Piece, other: Piece, reach: number, inside: boolean): TiePlace[] {
  const grid = triangleGrid(soup, other.triangles, other.bounds, reach);
  const area = areaOf(soup, piece.triangles);
  const nearest = new Float64Array(3);
  const pass = (count: number): TiePlace[] => {
    const places = scatterOnTriangles(soup, piece.triangles, count).positions;
    const found: TiePlace[] = [];
    for (let o = 0; o < places.length; o += 3) {
      const [x, y, z] = [places[o]!, places[o + 1]!, places[o + 2]!];
      if (nearestOnTriangles(nearest, grid, x, y, z) < Infinity) {
        found.push({
          x: 0.5 * (x + nearest[0]!),
          y: 0.5 * (y + nearest[1]!),
          z: 0.5 * (z + nearest[2]!),
          area: area / count,
        });
      } else if (inside && other.winding(x, y, z) > 0.5) {
        found.push({ x, y, z, area: area / count });
      }
    }
    return found;
  };
  const found = pass(PROBES);
  return found.length < FEW ? pass(DENSER * PROBES) : found;
}

/** Rows of both bodies at every tie. Both are taken at one place, so a − b vanishes at rest whatever the gap was. */
export function tieRows(places: TiePlaces, field: BasisField): Ties {
  const a = new RowBuilder(field.basis, places.count);
  const b = new RowBuilder(field.basis, places.count);
  for (let t = 0; t < places.count; t++) {
    const x = places.positions[3 * t]!;
    const y = places.positions[3 * t + 1]!;
    const z = places.positions[3 * t + 2]!;
    field.evaluate(x, y, z, places.bodyA[t]!, false);
    a.pushValues(field);
    field.evaluate(x, y, z, places.bodyB[t]!, false);
    b.pushValues(field);
  }
  return {
    count: places.count,
    a: a.done(),
    b: b.done(),
    areas: places.areas,
    bodyA: places.bodyA,
    bodyB: places.bodyB,
  };
}

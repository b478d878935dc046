import { evaluateRows } from '../../quadrature/rows';
import type { SurfaceMap } from '../../quadrature/prepared';
import type { ConvergenceEstimate } from '../../time/convergence';
import type { Simulation } from '../../time/simulation';
import type { CaseRow } from '../published-case';

export interface ProofCurve {
  name: string;
  kind: 'textbook' | 'here';
  points: readonly (readonly [number, number])[];
}

/** What a check of the proof sheet found; the first row is what the sheet tells of it. */
export interface ProofResult {
  rows: CaseRow[];
  plot: { x: string; y: string; curves: ProofCurve[] };
  /** the body as it came out, its movement drawn `magnified` times as large */
  body: { surface: SurfaceMap; coefficients: Float64Array; magnified: number };
  estimate: ConvergenceEstimate | null;
}

/** The pose with its movement magnified about rest. */
export function bodyOf(simulation: Simulation, rest: Float64Array, magnified: number): ProofResult['body'] {
  return {
    surface: simulation.prepared.surface,
    coefficients: simulation.coefficients.map((c, u) => rest[u]! + magnified * (c - rest[u]!)),
    magnified,
  };
}

/** Drawn vertices along a straight edge of the body: their places along `axis` at rest, and their displacements, m. */
export function alongEdge(
  simulation: Simulation,
  rest: Float64Array,
  axis: 0 | 1 | 2,
  at: readonly [number, number],
): { place: number; moved: [number, number, number] }[] {
  const { surface } = simulation.prepared;
  const now = rowPlaces(surface, simulation.coefficients);
  const before = rowPlaces(surface, rest);
  const [a, b] = [0, 1, 2].filter((d) => d !== axis) as [number, number];
  const found: { place: number; moved: [number, number, number] }[] = [];
  const seen = new Set<number>();
  for (let v = 0; v < surface.rows.count; v++) {
    const place = before.subarray(3 * v, 3 * v + 3);
    if (Math.abs(place[a]! - at[0]) > 1e-6 || Math.abs(place[b]! - at[1]) > 1e-6) continue;
    const key = Math.round(place[axis]! * 1e6);
    if (seen.has(key)) continue;
    seen.add(key);
    found.push({
      place: place[axis]!,
      moved: [0, 1, 2].map((d) => now[3 * v + d]! - place[d]!) as [number, number, number],
    });
  }
  return found.sort((p, q) => p.place - q.place);
}

function rowPlaces({ rows }: SurfaceMap, coefficients: Float64Array): Float64Array {
  return evaluateRows(new Float64Array(3 * rows.count), rows, coefficients) as Float64Array;
}

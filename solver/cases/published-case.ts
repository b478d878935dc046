import { shapePatches } from '../geometry/shapes';
import type { Patch } from '../geometry/patch';
import type { Kernels } from '../kernels/kernels';
import { prepare } from '../quadrature/prepare';
import type { Axis, Region, Scene, SceneMaterial, Vec3 } from '../scene';
import { Simulation } from '../time/simulation';

/** One number of a published case beside ours. SI units. */
export interface CaseRow {
  what: string;
  source: string;
  unit: string;
  parts: number;
  expected: number;
  ours: number;
  /** ours over expected − 1 */
  error: number;
  /** largest error, of either sign, that the case accepts */
  bar: number;
}

/** A case with its card in `solver/cases/<id>/CASE.md`. */
export interface PublishedCase {
  id: string;
  /** rows of the same `what` come with rising part counts, and the last is closer than the first */
  converges: boolean;
  rows(kernels: Kernels): CaseRow[];
}

/** The row with its error. */
export const compare = (row: Omit<CaseRow, 'error'>): CaseRow => ({ ...row, error: row.ours / row.expected - 1 });

export interface CaseOptions extends Partial<Omit<Scene, 'parts' | 'materials'>> {
  parts: number;
  material?: Partial<SceneMaterial>;
}

/** A scene of one material (E = 1 MPa, ν = 0.3, 1000 kg/m³ unless said otherwise), to be solved to rest in one step. */
export function caseScene({ parts, material, ...change }: CaseOptions): Scene {
  return {
    format: 'lollop-scene',
    version: 1,
    name: 'Published case',
    geometry: { kind: 'shapes', shapes: [] },
    unit: 1,
    up: 'z',
    parts: { count: parts, order: 'quadratic' },
    bondDistance: 0,
    materials: [
      {
        id: 'M1',
        name: 'Rubber',
        law: 'stable-neo-hookean',
        youngsModulus: 1e6,
        poissonsRatio: 0.3,
        density: 1000,
        ...material,
      },
    ],
    supports: [],
    loads: [],
    obstacles: [],
    gauges: [],
    time: { kind: 'static', loadSteps: 1 },
    ...change,
  };
}

export const box = (min: Vec3, max: Vec3): Scene['geometry'] => ({
  kind: 'shapes',
  shapes: [{ kind: 'box', min, max, gap: 0 }],
});

/** The scene ready to move; patches in metres, left out for built-in shapes. */
export function simulateCase(scene: Scene, kernels: Kernels, patches?: readonly Patch[]): Simulation {
  const own = scene.geometry.kind === 'shapes' ? scene.geometry.shapes.flatMap(shapePatches) : [];
  return new Simulation(prepare(scene, patches ?? own), scene, kernels);
}

/** Mean displacement of the scene's gauges, m. */
export function meanGauge(simulation: Simulation): Vec3 {
  const { gauges } = simulation.readouts();
  return [0, 1, 2].map((d) => gauges.reduce((sum, g) => sum + g.displacement[d]!, 0) / gauges.length) as Vec3;
}

/** Gauges on the four corners of the section at x of a bar along x from y = z = 0. */
export function sectionGauges(x: number, width: number, height: number): Scene['gauges'] {
  return [
    [0, 0],
    [1, 0],
    [0, 1],
    [1, 1],
  ].map(([j, k]) => ({ id: `G${j}${k}`, name: `Corner ${j}${k}`, point: [x, j! * width, k! * height] }));
}

/** The surface on the plane `axis` = `at` (m). */
export function plane(axis: Axis, at: number): Region {
  const along = (length: number): Vec3 => [
    axis === 'x' ? length : 0,
    axis === 'y' ? length : 0,
    axis === 'z' ? length : 0,
  ];
  return { kind: 'plane', point: along(at), normal: along(1), tolerance: 1e-6 };
}

/** Planes of symmetry through the origin, each held along its own axis. */
export const symmetry = (...axes: Axis[]): Scene['supports'] =>
  axes.map((axis) => ({ id: `P${axis}`, name: `Symmetry ${axis}`, region: plane(axis, 0), axes: [axis], keys: [] }));

/** The face x = 0 held in all directions. */
export const WALL: Scene['supports'][number] = {
  id: 'S1',
  name: 'Wall',
  region: plane('x', 0),
  axes: ['x', 'y', 'z'],
  keys: [],
};

import { patchFromGrid } from '../../geometry/shapes';
import type { Patch } from '../../geometry/patch';
import type { Kernels } from '../../kernels/kernels';
import type { Scene, Vec3 } from '../../scene';
import { caseScene, compare, plane, simulateCase, WALL, type CaseRow, type PublishedCase } from '../published-case';

const SOURCE = 'R. D. Cook, J. Struct. Div. ASCE 100 (1974) 1851; converged 23.96';
/** A thousandth of the card's unit force, so that the answer is linear. */
const FORCE = 1e-3;

type Corner = readonly [number, number];
const A: Corner = [0, 0];
const B: Corner = [48, 44];
const C: Corner = [48, 60];
const D: Corner = [0, 44];

function panel(): Patch[] {
  const side = (name: string, p: Corner, q: Corner) =>
    patchFromGrid(
      name,
      'panel',
      1,
      1,
      [p, q].map(([x, y]) => [0, 1].map((z): Vec3 => [x, y, z])),
    );
  const lid = (name: string, z: number) =>
    patchFromGrid(name, 'panel', 1, 1, [[A, D], [B, C]].map((row) => row.map(([x, y]): Vec3 => [x, y, z]))); // prettier-ignore
  return [
    side('low', A, B),
    side('load', B, C),
    side('top', C, D),
    side('wall', D, A),
    lid('front', 0),
    lid('back', 1),
  ];
}

const scene = (parts: number): Scene =>
  caseScene({
    parts,
    material: { youngsModulus: 1, poissonsRatio: 1 / 3, density: 1 },
    supports: [WALL],
    loads: [{ id: 'L1', name: 'Shear', kind: 'traction', region: plane('x', 48), traction: [0, FORCE / 16, 0] }],
    gauges: [0, 1].map((z) => ({ id: `G${z}`, name: 'Middle of the loaded edge', point: [48, 52, z] as Vec3 })),
  });

const rows = (kernels: Kernels): CaseRow[] =>
  [10, 24, 40].map((parts) => {
    const simulation = simulateCase(scene(parts), kernels, panel());
    simulation.solveStatic(1);
    const { gauges } = simulation.readouts();
    return compare({
      what: 'rise of a tapered panel under shear',
      source: SOURCE,
      unit: '',
      parts,
      expected: 23.96,
      ours: gauges.reduce((sum, g) => sum + g.displacement[1], 0) / gauges.length / FORCE,
      bar: parts < 24 ? 0.01 : 0.005,
    });
  });

export const cookMembrane: PublishedCase = { id: 'cook-membrane', converges: true, rows };

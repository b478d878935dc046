import type { Kernels } from '../../kernels/kernels';
import type { Scene } from '../../scene';
import { box, caseScene, compare, plane, simulateCase, type CaseRow, type PublishedCase } from '../published-case';

export const TORSION_SOURCE = 'S. P. Timoshenko and J. N. Goodier, Theory of Elasticity, 3rd ed. (1970), sec. 109';
/** Torque for 10° over 1 m, N m: square of side 0.1 m (k1 = 0.140577), circle of radius 0.05 m. */
export const TORQUE = { square: 0.943666, round: 0.659028 };

/** A bar along x, both ends free to warp, the far one turned. */
export function torsionScene(section: keyof typeof TORQUE, degrees: number, parts: number): Scene {
  return caseScene({
    parts,
    geometry:
      section === 'square'
        ? box([0, -0.05, -0.05], [1, 0.05, 0.05])
        : { kind: 'shapes', shapes: [{ kind: 'cylinder', start: [0, 0, 0], end: [1, 0, 0], radius: 0.05 }] },
    supports: [
      { id: 'S1', name: 'Near end', region: plane('x', 0), axes: ['y', 'z'], keys: [] },
      {
        id: 'S2',
        name: 'Far end',
        region: plane('x', 1),
        axes: ['y', 'z'],
        pivot: [1, 0, 0],
        keys: [{ time: 0, translation: [0, 0, 0], rotationDegrees: [degrees, 0, 0] }],
      },
      // The middle of an end does not warp: it keeps the bar from sliding.
      { id: 'S3', name: 'Middle', region: { kind: 'sphere', centre: [0, 0, 0], radius: 0.02 }, axes: ['x'], keys: [] },
    ],
  });
}

function rows(kernels: Kernels): CaseRow[] {
  const cases = [
    ['round', 24, 0.01],
    ['square', 10, 0.2],
    ['square', 24, 0.05],
    ['square', 40, 0.01],
  ] as const;
  return cases.map(([section, parts, bar]) => {
    const simulation = simulateCase(torsionScene(section, 1, parts), kernels);
    simulation.solveStatic(1);
    return compare({
      what: `torque of a ${section} bar, per degree and metre`,
      source: TORSION_SOURCE,
      unit: 'N m',
      parts,
      expected: TORQUE[section] / 10,
      ours: simulation.readouts().supports[1]!.moment[0],
      bar,
    });
  });
}

export const torsion: PublishedCase = { id: 'torsion', converges: true, rows };

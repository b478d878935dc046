import { PotentialEnergy } from '../../../solver/energy/potential';
import { bestKernels, type Scene } from '../../../solver/index';
import { systemPattern } from '../../../solver/time/system-pattern';
import { affineCoefficients, cube, prepareScene } from '../../support/solve-scene';

// solver/cases/homogeneous-stretch/CASE.md. Bonet and Wood (2008), sec. 6.4.3 (law A); law B: value from memory.
// Rows: law, nu, stretch, lateral stretch, nominal stress in Pa (E = 1 MPa), from the closed forms of the card.
const UNIAXIAL = [
  ['neo-hookean-a', 0.3, 0.5, 1.210767391, -935352.0569],
  ['neo-hookean-a', 0.3, 1.5, 0.8801745918, 378280.1764],
  ['neo-hookean-a', 0.3, 3, 0.6881110295, 1093141.437],
  ['neo-hookean-b', 0.3, 0.5, 1.154700538, -833333.3333],
  ['neo-hookean-b', 0.3, 1.5, 0.8718684639, 382011.6363],
  ['neo-hookean-a', 0.45, 1.5, 0.8306789808, 358614.3519],
  ['neo-hookean-b', 0.45, 2, 0.7246517559, 599117.2125],
] as const;

/** Stress P_ii of a homogeneous F through the discrete energy: gradient along a unit rate of F_ii, over the volume. */
function stresses(scene: Scene, F: number[]): number[] {
  const prepared = prepareScene(scene);
  const pattern = systemPattern(prepared);
  const bound = bestKernels().bind(prepared.points, pattern, prepared.parts.basis);
  const potential = new PotentialEnergy(prepared, scene, bound, pattern);
  const r = new Float64Array(prepared.parts.count * 3 * prepared.parts.basis);
  potential.gradient(affineCoefficients(prepared, F, [0, 0, 0]), r);
  const volume = prepared.points.volumes.reduce((sum, v) => sum + v, 0);
  return [0, 4, 8].map((entry) => {
    const unit = new Array<number>(9).fill(0);
    unit[entry] = 1;
    const rate = affineCoefficients(prepared, unit, [0, 0, 0]);
    return r.reduce((sum, g, u) => sum + g * rate[u]!, 0) / volume;
  });
}

it.each(UNIAXIAL)('%s, nu = %s, stretch %s', (law, poissonsRatio, a, lateral, P) => {
  const [px, py, pz] = stresses(cube({}, { law, poissonsRatio }), [a, 0, 0, 0, lateral, 0, 0, 0, lateral]);
  expect(Math.abs(px! / P - 1)).toBeLessThan(1e-6);
  // The free sides carry nothing, to the digits of the tabled lateral stretch.
  expect(Math.abs(py!)).toBeLessThan(5e-6 * 1e6);
  expect(Math.abs(pz!)).toBeLessThan(5e-6 * 1e6);
});

it.each([0, 0.3, 0.45])('stable neo-Hookean, nu = %s: small strain gives E', (poissonsRatio) => {
  const e = 1e-7;
  const [px] = stresses(cube({}, { poissonsRatio }), [
    1 + e,
    0,
    0,
    0,
    1 - poissonsRatio * e,
    0,
    0,
    0,
    1 - poissonsRatio * e,
  ]);
  expect(px! / e / 1e6).toBeCloseTo(1, 5);
});

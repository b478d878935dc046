import type { Kernels } from '../../kernels/kernels';
import { naturalModes } from '../../time/natural-frequencies';
import { box, caseScene, compare, simulateCase, WALL, type CaseRow, type PublishedCase } from '../published-case';

const SOLID = 'converged quadratic hexahedra';
const BLEVINS = 'R. D. Blevins, Formulas for Natural Frequency and Mode Shape (1979), tables 8-1, 8-16';

/** Of the held prism, Hz: two bending pairs, twist, stretch. Quadratic hexahedra 24 × 3 × 3. */
const HELD: Record<string, { nu: number; hertz: readonly (readonly [string, number])[] }> = {
  rubber: {
    nu: 0.3,
    hertz: [
      ['1st bending', 0.50933],
      ['1st sideways bending', 0.50933],
      ['2nd bending', 3.05479],
      ['2nd sideways bending', 3.05479],
      ['1st twist', 4.5189],
      ['1st stretch', 7.92925],
    ],
  },
  soft: {
    nu: 0.45,
    hertz: [
      ['1st bending', 0.51281],
      ['1st sideways bending', 0.51281],
      ['2nd bending', 3.06404],
      ['2nd sideways bending', 3.06404],
      ['1st twist', 4.28087],
      ['1st stretch', 7.96654],
    ],
  },
};

function held(kernels: Kernels): CaseRow[] {
  return Object.values(HELD).flatMap(({ nu, hertz }) =>
    [10, 24, 40].flatMap((parts) => {
      const scene = caseScene({
        parts,
        material: { poissonsRatio: nu },
        geometry: box([0, 0, 0], [1, 0.1, 0.1]),
        supports: [WALL],
      });
      const modes = naturalModes(simulateCase(scene, kernels).prepared, scene, kernels, hertz.length);
      return hertz.map(([name, expected], k) =>
        compare({
          what: `${name} frequency of a held bar, ν = ${nu}`,
          source: SOLID,
          unit: 'Hz',
          parts,
          expected,
          ours: modes[k]!.frequency,
          // Warping of a square section needs more than one part across: see the card.
          bar: name.includes('twist') ? { 10: 0.1, 24: 0.02, 40: 0.01 }[parts]! : parts < 24 ? 0.05 : 0.01,
        }),
      );
    }),
  );
}

function free(kernels: Kernels): CaseRow[] {
  const slender = 0.025;
  const bars = [
    { side: slender, count: 8, picks: [[6, `1st bending frequency of a free bar, slenderness 40`, 0.8126425]] },
    { side: 0.1, count: 14, picks: [[13, '1st stretch frequency of a free bar', 15.8114]] },
  ] as const;
  return bars.flatMap(({ side, count, picks }) => {
    const parts = 24;
    const scene = caseScene({ parts, geometry: box([0, 0, 0], [1, side, side]) });
    const modes = naturalModes(simulateCase(scene, kernels).prepared, scene, kernels, count, 25);
    return picks.map(([k, what, expected]) =>
      compare({ what, source: BLEVINS, unit: 'Hz', parts, expected, ours: modes[k]!.frequency, bar: 0.01 }),
    );
  });
}

export const frequencies: PublishedCase = {
  id: 'frequencies',
  converges: false,
  rows: (kernels) => [...held(kernels), ...free(kernels)],
};

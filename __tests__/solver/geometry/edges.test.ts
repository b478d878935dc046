import { analyseEdges, edgeTolerance } from '../../../solver/geometry/edges';
import type { Patch } from '../../../solver/geometry/patch';
import { patchFromGrid, shapePatches } from '../../../solver/geometry/shapes';
import type { Vec3 } from '../../../solver/scene';
import { readBezierPatchText } from '../../../solver/exchange/bezier-patch-text';
import { sampleText } from '../../support/samples';

const flat = (x0: number, x1: number, y0: number, y1: number, z = 0): Patch => {
  const p = (x: number, y: number): Vec3 => [x, y, z];
  return patchFromGrid('flat', '', 1, 1, [
    [p(x0, y0), p(x0, y1)],
    [p(x1, y0), p(x1, y1)],
  ]);
};
const counts = (patches: Patch[]) => {
  const { joined, gapped, open, degenerate } = analyseEdges(patches);
  return { joined, gapped, open, degenerate };
};

describe('teapot of 32 bicubic patches (M. Newell 1975; counts as recorded beside the sample, before and apart from this code)', () => {
  const text = sampleText('teapot_32patches.bpt');
  (text === null ? test.skip : test)('104 edges joined, 10 with a gap, 6 free, 8 pinched', () => {
    const patches = readBezierPatchText(text!).patches;
    expect(patches).toHaveLength(32);
    // With the default tolerance. Lid and rim are .100 apart, 1.2 % of the diagonal; the handle's and spout's free edges
    // are more than .21, 2.6 %, from any other.
    expect(counts(patches)).toEqual({ joined: 104, gapped: 10, open: 6, degenerate: 8 });
    expect(analyseEdges(patches).largestGap).toBeCloseTo(0.1004, 4);
  });
});

describe('closed shapes', () => {
  test('a sphere of one patch: two poles and a seam joined with itself', () => {
    const { edges, ...totals } = analyseEdges(shapePatches({ kind: 'sphere', centre: [5, 5, 5], radius: 1 }));
    expect(totals).toEqual({ joined: 2, gapped: 0, open: 0, degenerate: 2, largestGap: 0 });
    expect(edges.filter((e) => e.state === 'joined').map((e) => [e.side, e.neighbour])).toEqual([
      [0, { patch: 0, side: 1 }],
      [1, { patch: 0, side: 0 }],
    ]);
  });

  test('a torus of one patch joins itself on all four sides', () => {
    expect(
      counts(shapePatches({ kind: 'torus', centre: [0, 0, 0], axis: [0, 0, 1], majorRadius: 2, minorRadius: 0.5 })),
    ).toEqual({
      joined: 4,
      gapped: 0,
      open: 0,
      degenerate: 0,
    });
  });

  test.each([1e-6, 1, 1e6])('a box joins everywhere, whatever its size (%p)', (size) => {
    const box = shapePatches({ kind: 'box', min: [0, 0, 0], max: [size, size / 2, size / 3], gap: 0 });
    expect(counts(box)).toEqual({ joined: 24, gapped: 0, open: 0, degenerate: 0 });
  });

  test('faces drawn in by a gap leave that gap, diagonally across each edge', () => {
    const gap = 0.002;
    const report = analyseEdges(shapePatches({ kind: 'box', min: [0, 0, 0], max: [1, 1, 1], gap }));
    expect(report.gapped).toBe(24);
    expect(report.largestGap).toBeCloseTo(gap * Math.SQRT2, 12);
  });
});

describe('edges that match in part', () => {
  test('one long edge against two short ones is joined (T-joint)', () => {
    const { edges } = analyseEdges([flat(0, 2, 0, 1), flat(0, 1, 1, 2), flat(1, 2, 1, 2)]);
    const upper = edges.find((e) => e.patch === 0 && e.side === 3)!;
    expect(upper.state).toBe('joined');
    expect(upper.gap).toBeLessThan(1e-12);
    expect(edges.filter((e) => e.side === 2 && e.patch > 0).map((e) => [e.state, e.neighbour])).toEqual([
      ['joined', { patch: 0, side: 3 }],
      ['joined', { patch: 0, side: 3 }],
    ]);
  });

  test('a long edge that is covered by half is open, the short one joined', () => {
    const { edges } = analyseEdges([flat(0, 2, 0, 1), flat(0, 1, 1, 2)]);
    expect(edges.find((e) => e.patch === 0 && e.side === 3)!.state).toBe('open');
    expect(edges.find((e) => e.patch === 1 && e.side === 2)!.state).toBe('joined');
  });

  test('an edge that drifts off its neighbour has its widest distance as the gap', () => {
    const slanted = patchFromGrid('slanted', '', 1, 1, [
      [[0, 1, 0], [0, 2, 0]],
      [[2, 1.03, 0], [2, 2, 0]],
    ]); // prettier-ignore
    const { edges } = analyseEdges([flat(0, 2, 0, 1), slanted]);
    const edge = edges.find((e) => e.patch === 1 && e.side === 2)!;
    expect(edge.state).toBe('gapped');
    expect(edge.gap).toBeCloseTo(0.03, 12);
  });
});

test('the same curve in another parametrisation is joined: exactness is that of the curve, not of its chords', () => {
  const quarter = (knots: number[], inserted: boolean): Patch => {
    const w = Math.SQRT1_2;
    const h = (1 + w) / 2;
    // The quarter circle, plain or with its knot inserted at the middle (Piegl and Tiller 1997, eq. 5.15).
    const arc: [number, number, number][] = inserted
      ? [[1, 0, 1], [1, w / (2 * h), h], [w / (2 * h), 1, h], [0, 1, 1]]
      : [[1, 0, 1], [1, 1, w], [0, 1, 1]]; // prettier-ignore
    const z = inserted ? [1, 2] : [0, 1];
    return patchFromGrid(
      'arc',
      '',
      2,
      1,
      arc.map(([x, y]): Vec3[] => z.map((height): Vec3 => [x, y, height])),
      arc.map(([, , weight]) => [weight, weight]),
      { u: knots },
    );
  };
  const plain = quarter([0, 0, 0, 1, 1, 1], false);
  const split = quarter([0, 0, 0, 0.5, 1, 1, 1], true);
  const { edges } = analyseEdges([plain, split]);
  const shared = edges.find((e) => e.patch === 0 && e.side === 3)!;
  expect(shared.state).toBe('joined');
  expect(shared.gap).toBeLessThan(1e-9);
});

test('a narrow strip is open, not a gap between its own long sides', () => {
  expect(counts([flat(0, 10, 0, 0.05)])).toEqual({ joined: 0, gapped: 0, open: 4, degenerate: 0 });
});

test('the tolerance can be given', () => {
  const patches = [flat(0, 1, 0, 1), flat(0, 1, 1.01, 2)];
  expect(counts(patches).gapped).toBe(2);
  expect(analyseEdges(patches, { joined: 0.02, reach: 0.02 }).joined).toBe(2);
  expect(analyseEdges(patches, { ...edgeTolerance(patches), reach: 0.005 }).gapped).toBe(0);
});

test('no patches, no edges', () => {
  expect(analyseEdges([])).toEqual({ joined: 0, gapped: 0, open: 0, degenerate: 0, largestGap: 0, edges: [] });
});

import { readModelFile } from '../../../solver/exchange/read-model-file';
import { MILLIMETRE_CONTEXT, squareText, stepText } from '../../support/step-text';

const read = (data: string, context?: string) =>
  readModelFile(new TextEncoder().encode(stepText(data, context)), 'assembly.stp');
/** First and last corner of a patch. */
const corners = (points: Float64Array) => [[...points.subarray(0, 3)], [...points.subarray(9, 12)]];

/** A frame with its z axis along `axis` and x along `reference`. */
const frame = (id: number, origin: number[], axis: number[], reference: number[]) => {
  const list = (v: number[]) => v.map((x) => `${x}${Number.isInteger(x) ? '.' : ''}`).join(',');
  return (
    `#${id}=AXIS2_PLACEMENT_3D('',#${id + 1},#${id + 2},#${id + 3});\n#${id + 1}=CARTESIAN_POINT('',(${list(origin)}));\n` +
    `#${id + 2}=DIRECTION('',(${list(axis)}));\n#${id + 3}=DIRECTION('',(${list(reference)}));`
  );
};

const ORIGIN = frame(60, [0, 0, 0], [0, 0, 1], [1, 0, 0]);
const relation = (id: number, child: number, whole: number, from: number, to: number) =>
  `#${id}=(REPRESENTATION_RELATIONSHIP('','',#${child},#${whole})REPRESENTATION_RELATIONSHIP_WITH_TRANSFORMATION(#${id + 1})SHAPE_REPRESENTATION_RELATIONSHIP());\n` +
  `#${id + 1}=ITEM_DEFINED_TRANSFORMATION('','',#${from},#${to});`;

const PIECE = `${squareText(10)}\n#20=SHAPE_REPRESENTATION('piece',(#10,#60),#900);\n${ORIGIN}`;

test('a piece is turned and moved to its frame in the whole', () => {
  // z to x, x to y, so y to z; then 10 along x.
  const to = frame(70, [10, 0, 0], [1, 0, 0], [0, 1, 0]);
  const { patches, report } = read(
    `${PIECE}\n${to}\n#30=SHAPE_REPRESENTATION('whole',(#60,#70),#900);\n${relation(80, 20, 30, 60, 70)}`,
  );
  expect(report).toMatchObject({ declared: 1, imported: 1, remarks: [] });
  expect(corners(patches[0]!.points)).toEqual([
    [10, 0, 0],
    [10, 1, 1],
  ]);
});

test('a frame of the piece away from its origin is undone first', () => {
  const from = frame(64, [1, 1, 0], [0, 0, 1], [1, 0, 0]);
  const { patches } = read(
    `${PIECE}\n${from}\n#30=SHAPE_REPRESENTATION('whole',(#60),#900);\n${relation(80, 20, 30, 64, 60)}`,
  );
  expect(corners(patches[0]!.points)).toEqual([
    [-1, -1, 0],
    [0, 0, 0],
  ]);
});

test('a piece placed twice counts twice; placements multiply through a second level', () => {
  const five = frame(70, [5, 0, 0], [0, 0, 1], [1, 0, 0]);
  const up = frame(74, [0, 0, 2], [0, 0, 1], [1, 0, 0]);
  const { patches, report } = read(
    `${PIECE}\n${five}\n${up}\n#30=SHAPE_REPRESENTATION('half',(#60,#70),#900);\n#31=SHAPE_REPRESENTATION('whole',(#60,#74),#900);\n` +
      `${relation(80, 20, 30, 60, 60)}\n${relation(82, 20, 30, 60, 70)}\n${relation(84, 30, 31, 60, 74)}`,
  );
  expect(report).toMatchObject({ declared: 2, imported: 2 });
  expect(patches.map((p) => p.points[0]).sort()).toEqual([0, 5]);
  expect(patches.map((p) => p.points[2])).toEqual([2, 2]);
});

test('geometry linked to its product without a transformation stays where it is', () => {
  const { patches, report } = read(
    `${PIECE}\n#30=SHAPE_REPRESENTATION('product',(#60),#900);\n#80=SHAPE_REPRESENTATION_RELATIONSHIP('','',#30,#20);`,
  );
  expect(report).toMatchObject({ declared: 1, imported: 1, remarks: [] });
  expect(corners(patches[0]!.points)[1]).toEqual([1, 1, 0]);
});

test('a mapped item places its map’s representation', () => {
  const to = frame(70, [0, 7, 0], [0, 0, 1], [0, 1, 0]);
  const { patches } = read(
    `${PIECE}\n${to}\n#90=REPRESENTATION_MAP(#60,#20);\n#91=MAPPED_ITEM('',#90,#70);\n#30=SHAPE_REPRESENTATION('whole',(#91),#900);`,
  );
  expect(corners(patches[0]!.points)).toEqual([
    [0, 7, 0],
    [-1, 8, 0],
  ]);
});

test('the usage tells which of the two is the whole when they are swapped', () => {
  const to = frame(70, [10, 0, 0], [0, 0, 1], [1, 0, 0]);
  const product = (id: number, representation: number, name: string) =>
    `#${id}=PRODUCT('${name}','${name}','',());\n#${id + 1}=PRODUCT_DEFINITION_FORMATION('','',#${id});\n#${id + 2}=PRODUCT_DEFINITION('','',#${id + 1},$);\n` +
    `#${id + 3}=PRODUCT_DEFINITION_SHAPE('','',#${id + 2});\n#${id + 4}=SHAPE_DEFINITION_REPRESENTATION(#${id + 3},#${representation});`;
  const usage =
    "#130=NEXT_ASSEMBLY_USAGE_OCCURRENCE('1','','',#112,#102,$);\n#131=PRODUCT_DEFINITION_SHAPE('','',#130);\n#132=CONTEXT_DEPENDENT_SHAPE_REPRESENTATION(#80,#131);";
  const { patches } = read(
    `${PIECE}\n${to}\n#30=SHAPE_REPRESENTATION('whole',(#60,#70),#900);\n${product(100, 20, 'nut')}\n${product(110, 30, 'car')}\n${relation(80, 30, 20, 70, 60)}\n${usage}`,
  );
  expect(patches[0]!.points[0]).toBe(10);
});

test('pieces of several products are grouped by product', () => {
  const product = (id: number, representation: number, name: string) =>
    `#${id}=PRODUCT('','${name}','',());\n#${id + 1}=PRODUCT_DEFINITION_FORMATION('','',#${id});\n#${id + 2}=PRODUCT_DEFINITION('','',#${id + 1},$);\n` +
    `#${id + 3}=PRODUCT_DEFINITION_SHAPE('','',#${id + 2});\n#${id + 4}=SHAPE_DEFINITION_REPRESENTATION(#${id + 3},#${representation});`;
  const { patches } = read(
    `${PIECE}\n${squareText(40, 3)}\n#50=SHAPE_REPRESENTATION('',(#40),#900);\n${product(100, 20, 'hull')}\n${product(110, 50, 'mast')}`,
  );
  expect(patches.map((p) => p.group)).toEqual(['hull', 'mast']);
});

test('layers name groups where solids and sets do not', () => {
  const { patches } = read(
    `${squareText(10)}\n#20=GEOMETRIC_SET('',(#10));\n#21=PRESENTATION_LAYER_ASSIGNMENT('sails','',(#10));\n#22=SHAPE_REPRESENTATION('',(#20),#900);`,
  );
  expect(patches[0]!.group).toBe('sails');
});

describe('damage', () => {
  test('a frame that cannot be read leaves the piece where it was drawn, and says so', () => {
    const bad = frame(70, [10, 0, 0], [0, 0, 0], [1, 0, 0]);
    const { patches, report } = read(
      `${PIECE}\n${bad}\n#30=SHAPE_REPRESENTATION('',(#60,#70),#900);\n${relation(80, 20, 30, 60, 70)}`,
    );
    expect(patches[0]!.points[0]).toBe(0);
    expect(report.remarks).toEqual([
      'The place of a piece in its assembly could not be read. The piece is shown where it was drawn.',
    ]);
  });

  test('a piece inside itself ends', () => {
    const { report } = read(
      `${PIECE}\n#30=SHAPE_REPRESENTATION('',(#60),#900);\n${relation(80, 20, 30, 60, 60)}\n${relation(82, 20, 20, 60, 60)}`,
    );
    expect(report.remarks).toEqual(['A piece that the file places inside itself was left out there.']);
    expect(report.imported).toBe(1);
  });

  test('two pieces inside each other are still read once', () => {
    const { report } = read(
      `${PIECE}\n#30=SHAPE_REPRESENTATION('',(#60),#900);\n${relation(80, 20, 30, 60, 60)}\n${relation(82, 30, 20, 60, 60)}`,
    );
    expect(report).toMatchObject({ declared: 1, imported: 1 });
  });

  test('twenty levels of two pieces each are cut off, not counted out', () => {
    const levels = Array.from({ length: 20 }, (_, k) => `#${200 + k}=SHAPE_REPRESENTATION('',(#60),#900);`);
    const links = levels.map((_, k) => {
      const child = k === 0 ? 20 : 199 + k;
      return `${relation(300 + 4 * k, child, 200 + k, 60, 60)}\n${relation(302 + 4 * k, child, 200 + k, 60, 60)}`;
    });
    const { report } = read(`${PIECE}\n${levels.join('\n')}\n${links.join('\n')}`, MILLIMETRE_CONTEXT);
    expect(report.remarks).toContain('The file places more pieces than can be read. The rest was left out.');
    expect(report.declared).toBe(report.imported + report.skipped.reduce((sum, s) => sum + s.count, 0));
  });
});

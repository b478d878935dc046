import { readModelFile } from '../../../solver/exchange/read-model-file';
import { PatchEvaluator } from '../../../solver/geometry/evaluate-patch';
import { MILLIMETRE_CONTEXT, squareText, stepText } from '../../support/step-text';

const read = (data: string, context?: string) =>
  readModelFile(new TextEncoder().encode(stepText(data, context)), 'test.stp');
const message = (data: string): string => {
  try {
    read(data);
  } catch (error) {
    expect((error as Error).name).toBe('UnreadableModelError');
    return (error as Error).message;
  }
  throw new Error('It was read.');
};

describe('surfaces (ISO 10303-42)', () => {
  const points = (n: number) =>
    Array.from({ length: n }, (_, k) => `#${k + 1}=CARTESIAN_POINT('',(${k % 3}.,${Math.floor(k / 3)}.,0.));`).join(
      '\n',
    );
  const rows = '((#1,#4,#7),(#2,#5,#8),(#3,#6,#9))';
  const base = `2,2,${rows},.UNSPECIFIED.,.F.,.F.,.F.`;

  test.each([
    [
      'B_SPLINE_SURFACE_WITH_KNOTS',
      `${base},(3,3),(3,3),(0.,2.),(-1.,1.),.UNSPECIFIED.`,
      [0, 0, 0, 2, 2, 2],
      [-1, -1, -1, 1, 1, 1],
    ],
    ['BEZIER_SURFACE', base, [0, 0, 0, 1, 1, 1], [0, 0, 0, 1, 1, 1]],
    ['QUASI_UNIFORM_SURFACE', base, [0, 0, 0, 1, 1, 1], [0, 0, 0, 1, 1, 1]],
    ['UNIFORM_SURFACE', base, [-2, -1, 0, 1, 2, 3], [-2, -1, 0, 1, 2, 3]],
  ])('%s, simple', (type, args, knotsU, knotsV) => {
    const { patches } = read(`${points(9)}\n#20=${type}('top',${args});`);
    expect(patches).toHaveLength(1);
    expect(patches[0]).toMatchObject({ name: 'top', degreeU: 2, degreeV: 2, countU: 3, countV: 3 });
    expect([...patches[0]!.knotsU]).toEqual(knotsU);
    expect([...patches[0]!.knotsV]).toEqual(knotsV);
    expect([...patches[0]!.points.subarray(0, 9)]).toEqual([0, 0, 0, 0, 1, 0, 0, 2, 0]);
  });

  test('rational in external mapping, names in any order of records', () => {
    const { patches } = read(
      `${points(9)}\n#20=(BOUNDED_SURFACE()B_SPLINE_SURFACE(${base})B_SPLINE_SURFACE_WITH_KNOTS((3,3),(3,3),(0.,1.),(0.,1.),.UNSPECIFIED.)` +
        `GEOMETRIC_REPRESENTATION_ITEM()RATIONAL_B_SPLINE_SURFACE(((1.,2.,1.),(1.,.5,1.),(1.,1.,1.E-1)))REPRESENTATION_ITEM('arc')SURFACE());`,
    );
    expect(patches[0]!.name).toBe('arc');
    expect([...patches[0]!.weights]).toEqual([1, 2, 1, 1, 0.5, 1, 1, 1, 0.1]);
  });

  test('comments, line breaks inside tokens’ gaps, and strings that hold a semicolon or a parenthesis', () => {
    const { patches } = read(squareText(10, 0, 0, 'a;b(c)d').replace('=B_SPLINE', ' /* a ; comment ( */ =\n B_SPLINE'));
    expect(patches[0]!.name).toBe('a;b(c)d');
  });

  test.each([
    ['(2,2),(0.,1.)', '(2,3),(0.,1.)', 'the number of knots does not fit'],
    ['(2,2),(0.,1.)', '(2,2),(0.,1.,2.)', 'its knots are missing'],
    ['(0.,1.),(0.,1.)', '(1.,0.),(0.,1.)', 'the knots fall'],
    ['(0.,1.),(0.,1.)', '(1.,1.),(0.,1.)', 'its parameter range is empty'],
    ['(2,2),(2,2)', '(2,2000000000),(2,2)', 'the number of knots does not fit'],
    ['(2,2),(2,2)', '(2,1.5),(2,2)', 'a knot’s multiplicity is not a whole number'],
    ['(2,2),(2,2)', '(2,-2),(2,2)', 'a knot’s multiplicity is not a whole number'],
    ["'',1,1,", "'',0,1,", 'degree 0; 1 to 25 can be read'],
    ["'',1,1,", "'',1,26,", 'degree 26; 1 to 25 can be read'],
    ["'',1,1,", "'',1,$,", 'degree missing; 1 to 25 can be read'],
    ['((#11,#12),(#13,#14))', '((#11,#12),(#13))', 'its control points are not a grid'],
    ['((#11,#12),(#13,#14))', '((#11,#12),(#13,#99))', 'a control point is missing from the file'],
    ['((#11,#12),(#13,#14))', '((#11,#12),(#13,#10))', 'a control point is missing from the file'],
    ['((#11,#12),(#13,#14))', '((#11,#12))', 'the number of knots does not fit'],
    ['((#11,#12),(#13,#14))', '()', 'its control points are not a grid'],
    ['(1.,1.,0.)', '(1.,1.E300,0.)', 'a coordinate is not a usable number'],
    ['(1.,1.,0.)', "(1.,'x',0.)", 'a coordinate is not a usable number'],
  ])('%s → %s is skipped: %s', (from, to, reason) => {
    const damaged = squareText(10).replace(from, to);
    expect(damaged).not.toBe(squareText(10));
    const { report } = read(`${damaged}\n${squareText(30)}`);
    expect(report).toMatchObject({
      declared: 2,
      imported: 1,
      skipped: [{ entity: 'B-spline surface', count: 1, reason }],
    });
    expect(message(damaged)).toContain(reason);
  });

  test.each(['0.', '-1.', 'NaN', '1.E400'])('a weight of %s is refused', (weight) => {
    const weighted = (w: string) =>
      `#20=(BOUNDED_SURFACE()B_SPLINE_SURFACE(${base})B_SPLINE_SURFACE_WITH_KNOTS((3,3),(3,3),(0.,1.),(0.,1.),.UNSPECIFIED.)GEOMETRIC_REPRESENTATION_ITEM()` +
      `RATIONAL_B_SPLINE_SURFACE(((1.,1.,1.),(1.,${w},1.),(1.,1.,1.)))REPRESENTATION_ITEM('')SURFACE());`;
    expect(read(`${points(9)}\n${weighted('.25')}`).report.imported).toBe(1);
    expect(message(`${points(9)}\n${weighted(weight)}`)).toContain('a weight is not a positive number');
  });
});

describe('what is not a B-spline is counted with a reason', () => {
  test('planes and cylinders beside one patch', () => {
    const { report } = read(
      `${squareText(10)}\n#30=PLANE('',#1);\n#31=PLANE('',#1);\n#32=CYLINDRICAL_SURFACE('',#1,5.);\n#33=RECTANGULAR_TRIMMED_SURFACE('',#10,0.,1.,0.,1.,.T.,.T.);`,
    );
    expect(report.declared).toBe(5);
    expect(report.skipped).toEqual([
      { entity: 'plane', count: 2, reason: 'only B-spline surfaces are read' },
      { entity: 'cylinder', count: 1, reason: 'only B-spline surfaces are read' },
      { entity: 'trimmed surface', count: 1, reason: 'only B-spline surfaces are read' },
    ]);
  });

  test('a file of planes only says what to do', () => {
    expect(message("#30=PLANE('',#1);\n#31=PLANE('',#1);")).toBe(
      'None of the 2 surfaces in this STEP file can be used (2 × plane: only B-spline surfaces are read). Export the model as B-splines and bring it again.',
    );
  });

  test('a file without surfaces', () => {
    expect(message("#30=DIRECTION('',(1.,0.,0.));")).toContain('No surfaces were found');
  });

  test('a surface whose line is damaged counts', () => {
    const { report } = read(`${squareText(10)}\n${squareText(30).replace('(2,2),(2,2)', '(2,2),(2,2@)')}`);
    expect(report).toMatchObject({
      declared: 2,
      imported: 1,
      skipped: [{ entity: 'B-spline surface', count: 1, reason: 'its line in the file is damaged' }],
      remarks: ['1 damaged line was passed over.'],
    });
  });

  test('of two instances with one number the second counts as damaged', () => {
    const { report } = read(`${squareText(10)}\n${squareText(10)}`);
    expect(report).toMatchObject({ declared: 2, imported: 1 });
  });
});

describe('faces', () => {
  const face = (sense: string, shellSense = '.T.') =>
    `${squareText(10)}\n#40=ADVANCED_FACE('lid',(),#10,${sense});\n#41=CLOSED_SHELL('',(#40));\n#42=ORIENTED_CLOSED_SHELL('',*,#41,${shellSense});\n` +
    `#43=MANIFOLD_SOLID_BREP('pot',#42);\n#44=ADVANCED_BREP_SHAPE_REPRESENTATION('',(#43),#900);`;
  const up = (data: string) => {
    const { patches } = read(data);
    expect(patches).toMatchObject([{ name: 'lid', group: 'pot' }]);
    const n = new Float64Array(3);
    new PatchEvaluator().normal(n, 0, patches[0]!, 0.5, 0.5);
    return n[2];
  };

  test.each([
    ['.T.', '.T.', 1],
    ['.F.', '.T.', -1],
    ['.T.', '.F.', -1],
    ['.F.', '.F.', 1],
  ])('sense %s in a shell of sense %s: the normal points to z = %i', (sense, shellSense, z) => {
    expect(up(face(sense, shellSense))).toBe(z);
  });

  const outlined = (corners: [number, number][]) => {
    const n = corners.length;
    const lines = corners.flatMap(([x, y], k) => [
      `#${100 + k}=CARTESIAN_POINT('',(${x.toFixed(6)},${y.toFixed(6)},0.));`,
      `#${120 + k}=VERTEX_POINT('',#${100 + k});`,
      `#${140 + k}=EDGE_CURVE('',#${120 + k},#${120 + ((k + 1) % n)},#180,.T.);`,
      `#${160 + k}=ORIENTED_EDGE('',*,*,#${140 + k},.T.);`,
    ]);
    const loop = `#190=EDGE_LOOP('',(${corners.map((_, k) => `#${160 + k}`).join(',')}));\n#191=FACE_OUTER_BOUND('',#190,.T.);`;
    return `${squareText(10)}\n${lines.join('\n')}\n#180=LINE('',#100,#1);\n${loop}\n#40=ADVANCED_FACE('',(#191),#10,.T.);\n#41=OPEN_SHELL('',(#40));\n#44=SHAPE_REPRESENTATION('',(#41),#900);`;
  };

  test.each<[string, [number, number][], boolean]>([
    ['its own border', [[0, 0], [1, 0], [1, 1], [0, 1]], false],
    ['its border with a corner in the middle of a side', [[0, 0], [0.5, 0], [1, 0], [1, 1], [0, 1]], false],
    ['a corner inside', [[0, 0], [1, 0], [0.5, 0.5], [0, 1]], true],
    ['a diagonal cut between two corners', [[0, 0], [1, 0], [0, 1]], true],
  ])('an outline along %s', (_, corners, trimmed) => {
    expect(read(outlined(corners)).report.remarks).toEqual(trimmed ? ['1 face is trimmed in the file and shown whole here.'] : []);
  }); // prettier-ignore
});

describe('length unit (ISO 10303-41; inch and foot as defined in 1959, NIST SP 811 app. B: value from memory)', () => {
  const context = (unit: string) =>
    `${unit}\n#900=(GEOMETRIC_REPRESENTATION_CONTEXT(3)GLOBAL_UNIT_ASSIGNED_CONTEXT((#901))REPRESENTATION_CONTEXT('',''));`;
  const conversion = (name: string, value: string) =>
    `#902=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT(.MILLI.,.METRE.));\n#903=LENGTH_MEASURE_WITH_UNIT(LENGTH_MEASURE(${value}),#902);\n` +
    `#904=DIMENSIONAL_EXPONENTS(1.,0.,0.,0.,0.,0.,0.);\n#901=(CONVERSION_BASED_UNIT('${name}',#903)LENGTH_UNIT()NAMED_UNIT(#904));`;

  test.each([
    ['#901=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT($,.METRE.));', 'm', 1],
    ['#901=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT(.CENTI.,.METRE.));', 'cm', 0.01],
    ['#901=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT(.KILO.,.METRE.));', 'km', 1000],
    ['#901=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT(.MICRO.,.METRE.));', 'µm', 1e-6],
    [conversion('INCH', '25.4'), 'inch', 0.0254],
    [conversion('FOOT', '304.8'), 'foot', 0.3048],
    [conversion('SMOOT', '1702.'), 'smoot', 1.702],
  ])('%#: %s', (unit, name, metres) => {
    const { declaredUnit } = read(squareText(10), context(unit)).report;
    expect(declaredUnit!.name).toBe(name);
    expect(Math.abs(declaredUnit!.metres / metres - 1)).toBeLessThan(1e-12);
  });

  test('a file that names none says so', () => {
    expect(read(squareText(10), '').report.declaredUnit).toBeNull();
  });

  test('a unit that is its own base does not go round for ever', () => {
    const loop =
      "#901=(CONVERSION_BASED_UNIT('X',#903)LENGTH_UNIT()NAMED_UNIT(*));\n#903=LENGTH_MEASURE_WITH_UNIT(LENGTH_MEASURE(2.),#901);";
    expect(read(squareText(10), context(loop)).report.declaredUnit).toBeNull();
  });

  test('pieces in another unit are converted to the first', () => {
    const metre =
      "#911=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT($,.METRE.));\n#910=(GEOMETRIC_REPRESENTATION_CONTEXT(3)GLOBAL_UNIT_ASSIGNED_CONTEXT((#911))REPRESENTATION_CONTEXT('',''));";
    const { patches, report } = read(
      `${squareText(10)}\n${squareText(30)}\n#50=SHAPE_REPRESENTATION('',(#10),#900);\n#51=SHAPE_REPRESENTATION('',(#30),#910);`,
      `${MILLIMETRE_CONTEXT}\n${metre}`,
    );
    expect(report.declaredUnit).toEqual({ name: 'mm', metres: 0.001 });
    expect(patches[1]!.points[11 - 1]).toBe(1000);
    expect(report.remarks).toEqual(['1 patch is in another unit in the file and converted to mm here.']);
  });
});

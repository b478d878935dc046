import type { Patch } from '../geometry/patch';

const SI_PREFIX: Record<string, string> = { '0.001': '.MILLI.', '0.01': '.CENTI.', '1': '$' };

/**
 * A STEP file (ISO 10303-21, AP214 geometry) of loose B-spline surfaces, one geometric set a group.
 * `metresPerUnit` is 0.001, 0.01 or 1. The text is the same for the same patches; `stamp` is an ISO 8601 instant.
 */
export function writeStep(patches: readonly Patch[], name: string, metresPerUnit: number, stamp: string): string {
  const prefix = SI_PREFIX[String(metresPerUnit)];
  if (!prefix) throw new RangeError(`STEP is written in mm, cm or m, not in units of ${metresPerUnit} m.`);
  const lines: string[] = [];
  let id = 0;
  const put = (text: string): string => {
    lines.push(`#${++id}=${text};`);
    return `#${id}`;
  };
  const text = (s: string) => `'${encodeString(s)}'`;
  const length = put(`(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT(${prefix},.METRE.))`);
  const angle = put('(NAMED_UNIT(*)PLANE_ANGLE_UNIT()SI_UNIT($,.RADIAN.))');
  const solidAngle = put('(NAMED_UNIT(*)SI_UNIT($,.STERADIAN.)SOLID_ANGLE_UNIT())');
  const context = put(
    `(GEOMETRIC_REPRESENTATION_CONTEXT(3)GLOBAL_UNIT_ASSIGNED_CONTEXT((${length},${angle},${solidAngle}))REPRESENTATION_CONTEXT('model','3D'))`,
  );
  const sets = new Map<string, string[]>();
  for (const patch of patches) {
    const set = sets.get(patch.group) ?? [];
    set.push(put(surfaceText(patch, put, text)));
    sets.set(patch.group, set);
  }
  const items = [...sets].map(([group, members]) => put(`GEOMETRIC_SET(${text(group)},(${members.join(',')}))`));
  const shape = put(
    `GEOMETRICALLY_BOUNDED_SURFACE_SHAPE_REPRESENTATION(${text(name)},(${items.join(',')}),${context})`,
  );
  const application = put("APPLICATION_CONTEXT('core data for automotive mechanical design processes')");
  put(`APPLICATION_PROTOCOL_DEFINITION('international standard','automotive_design',2000,${application})`);
  const productContext = put(`PRODUCT_CONTEXT('',${application},'mechanical')`);
  const product = put(`PRODUCT(${text(name)},${text(name)},'',(${productContext}))`);
  const formation = put(`PRODUCT_DEFINITION_FORMATION('','',${product})`);
  const definitionContext = put(`PRODUCT_DEFINITION_CONTEXT('part definition',${application},'design')`);
  const definition = put(`PRODUCT_DEFINITION('design','',${formation},${definitionContext})`);
  const definitionShape = put(`PRODUCT_DEFINITION_SHAPE('','',${definition})`);
  put(`SHAPE_DEFINITION_REPRESENTATION(${definitionShape},${shape})`);
  return [
    'ISO-10303-21;',
    'HEADER;',
    `FILE_DESCRIPTION((${text(name)}),'2;1');`,
    `FILE_NAME(${text(name)},'${stamp}',(''),(''),'Lollop','Lollop','');`,
    "FILE_SCHEMA(('AUTOMOTIVE_DESIGN { 1 0 10303 214 1 1 1 1 }'));",
    'ENDSEC;',
    'DATA;',
    ...lines,
    'ENDSEC;',
    'END-ISO-10303-21;',
    '',
  ].join('\n');
}

function surfaceText(patch: Patch, put: (text: string) => string, text: (s: string) => string): string {
  const { countU, countV, degreeU, degreeV, points, weights } = patch;
  const grid = (value: (k: number) => string) =>
    `(${Array.from({ length: countU }, (_, i) => `(${Array.from({ length: countV }, (_, j) => value(i * countV + j)).join(',')})`).join(',')})`;
  const control = grid((k) =>
    put(`CARTESIAN_POINT('',(${real(points[3 * k]!)},${real(points[3 * k + 1]!)},${real(points[3 * k + 2]!)}))`),
  );
  const [mu, ku] = multiplicities(patch.knotsU);
  const [mv, kv] = multiplicities(patch.knotsV);
  const base = `${degreeU},${degreeV},${control},.UNSPECIFIED.,.F.,.F.,.F.`;
  const knots = `(${mu.join(',')}),(${mv.join(',')}),(${ku.map(real).join(',')}),(${kv.map(real).join(',')}),.UNSPECIFIED.`;
  if (weights.every((w) => w === 1)) return `B_SPLINE_SURFACE_WITH_KNOTS(${text(patch.name)},${base},${knots})`;
  return (
    `(BOUNDED_SURFACE()B_SPLINE_SURFACE(${base})B_SPLINE_SURFACE_WITH_KNOTS(${knots})GEOMETRIC_REPRESENTATION_ITEM()` +
    `RATIONAL_B_SPLINE_SURFACE(${grid((k) => real(weights[k]!))})REPRESENTATION_ITEM(${text(patch.name)})SURFACE())`
  );
}

/** A real of ISO 10303-21: always with a decimal point, exponent after a capital E; reads back to the same number. */
function real(x: number): string {
  const [mantissa, exponent] = String(x).split('e');
  const point = mantissa!.includes('.') ? mantissa! : `${mantissa}.`;
  return exponent ? `${point}E${exponent.replace('+', '')}` : point;
}

function multiplicities(knots: Float64Array): [number[], number[]] {
  const counts: number[] = [];
  const values: number[] = [];
  for (const k of knots) {
    if (values[values.length - 1] === k) counts[counts.length - 1]!++;
    else {
      values.push(k);
      counts.push(1);
    }
  }
  return [counts, values];
}

function encodeString(s: string): string {
  return s
    .replace(/\\/g, '\\\\')
    .replace(/'/g, "''")
    .replace(/[^\x20-\x7e]+/g, (run) => {
      const hex = Array.from({ length: run.length }, (_, i) =>
        run.charCodeAt(i).toString(16).toUpperCase().padStart(4, '0'),
      );
      return `\\X2\\${hex.join('')}\\X0\\`;
    });
}

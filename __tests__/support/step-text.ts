/** A STEP file around the given DATA lines, with a millimetre context #900 unless `context` gives another. */
export function stepText(data: string, context = MILLIMETRE_CONTEXT): string {
  return `ISO-10303-21;\nHEADER;\nFILE_DESCRIPTION((''),'2;1');\nFILE_NAME('','',(''),(''),'','','');\nFILE_SCHEMA(('AUTOMOTIVE_DESIGN'));\nENDSEC;\nDATA;\n${context}\n${data}\nENDSEC;\nEND-ISO-10303-21;\n`;
}

export const MILLIMETRE_CONTEXT = [
  '#901=(LENGTH_UNIT()NAMED_UNIT(*)SI_UNIT(.MILLI.,.METRE.));',
  "#900=(GEOMETRIC_REPRESENTATION_CONTEXT(3)GLOBAL_UNIT_ASSIGNED_CONTEXT((#901))REPRESENTATION_CONTEXT('',''));",
].join('\n');

/** A flat square from (x, y, 0) to (x + 1, y + 1, 0) as instance `id`; its points take the next four numbers. */
export function squareText(id: number, x = 0, y = 0, name = ''): string {
  const points = [[0, 0], [0, 1], [1, 0], [1, 1]]
    .map(([u, v], k) => `#${id + 1 + k}=CARTESIAN_POINT('',(${x + u!}.,${y + v!}.,0.));`)
    .join('\n'); // prettier-ignore
  return (
    points +
    `\n#${id}=B_SPLINE_SURFACE_WITH_KNOTS('${name}',1,1,((#${id + 1},#${id + 2}),(#${id + 3},#${id + 4})),.UNSPECIFIED.,.F.,.F.,.F.,` +
    '(2,2),(2,2),(0.,1.),(0.,1.),.UNSPECIFIED.);'
  );
}

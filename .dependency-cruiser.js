/** Who may import whom. Every rule says why. @type {import('dependency-cruiser').IConfiguration} */
const LAYERS = [
  'math',
  'geometry',
  '(exchange|parts|weights|quadrature)',
  'material',
  '(kernels|energy|linear)',
  'time',
  '(frames|worker)',
  '(cases|bench)',
];

const layerRules = LAYERS.slice(0, -1).map((layer, k) => ({
  name: `solver-${layer.replace(/\W+/g, '-')}-below`,
  comment: 'Inside the solver lower layers know nothing of higher ones, so each can be read and tested alone.',
  severity: 'error',
  from: { path: `^solver/${layer}/` },
  to: {
    path: `^solver/(${LAYERS.slice(k + 1).join('|')})/`,
    pathNot: layer === '(exchange|parts|weights|quadrature)' ? '^$' : undefined,
  },
}));

module.exports = {
  forbidden: [
    ...layerRules.map(({ to, ...rule }) => ({
      ...rule,
      to: Object.fromEntries(Object.entries(to).filter(([, v]) => v !== undefined)),
    })),
    {
      name: 'solver-alone',
      comment: 'The solver runs in a worker, in Node and in tests; it must not depend on any of them.',
      severity: 'error',
      from: { path: '^solver/', pathNot: '^solver/(bench|kernels/build)' },
      to: { pathNot: '^solver/' },
    },
    {
      name: 'shared-is-small',
      comment: 'Both sides load shared/; it may know zod and, as types only, the solver.',
      severity: 'error',
      from: { path: '^shared/' },
      to: { pathNot: '^(shared/|node_modules/zod|solver/)' },
    },
    {
      name: 'components-from-public-solver',
      comment: 'The application knows the public surface of the solver, nothing behind it.',
      severity: 'error',
      from: { path: '^(components|app)/' },
      to: { path: '^solver/', pathNot: '^solver/(index\\.ts|worker/solver\\.worker\\.ts|cases/check\\.worker\\.ts)$' },
    },
    {
      name: 'web-and-server-apart',
      comment: 'What they share lies in shared/.',
      severity: 'error',
      from: { path: '^(components|app)/' },
      to: { path: '^server/' },
    },
    {
      name: 'server-knows-no-screens',
      comment: 'What they share lies in shared/.',
      severity: 'error',
      from: { path: '^server/' },
      to: { path: '^(components|app)/' },
    },
    {
      name: 'routes-compose',
      comment: 'Routes render one screen; they import components and the router only.',
      severity: 'error',
      from: { path: '^app/' },
      to: { path: '^(shared|solver)/' },
    },
    {
      name: 'three-on-the-stage-only',
      comment: 'The 3-D library is loaded with the stage and with nothing else.',
      severity: 'error',
      from: { path: '^(components|app)/', pathNot: '^components/stage/' },
      to: { path: '^node_modules/three/' },
    },
    {
      name: 'tests-imported-by-nobody',
      comment: 'Shipped code does not depend on tests.',
      severity: 'error',
      from: { pathNot: '^__tests__/' },
      to: { path: '^__tests__/' },
    },
    {
      name: 'no-circles',
      comment: 'A circle of imports is one module in disguise. Types may refer to each other, and entities do.',
      severity: 'error',
      from: { pathNot: '\\.entity\\.ts$' },
      to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '(^|/)(dist|dist-server|\\.data|\\.expo)/|solver/kernels/assembly' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: { extensions: ['.ts', '.tsx', '.mts', '.js', '.mjs', '.json'] },
  },
};

const edges = require('./tests/architecture/edges.cjs');

const slice = (root, from, to) => ({
  name: `edge-${root.split('/')[1]}-${from}`,
  severity: 'error',
  comment: 'A slice uses another only along a declared edge (tests/architecture/edges.cjs).',
  from: { path: `^${root}/${from}/` },
  to: { path: `^${root}/[^/]+/`, pathNot: [from, ...to].map((name) => `^${root}/${name}/`) },
});

module.exports = {
  forbidden: [
    { name: 'no-circular', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'domain-is-pure',
      severity: 'error',
      from: { path: '^src/shared/domain/', pathNot: '\\.test\\.ts$' },
      to: { pathNot: ['^src/shared/domain/', '^node_modules/@stdlib/', '^node_modules/temporal-polyfill/'] },
    },
    {
      name: 'temporal-in-business-day-only',
      severity: 'error',
      from: { path: '^src/shared/domain/', pathNot: '(business-day|\\.test)\\.ts$' },
      to: { path: '^node_modules/temporal-polyfill/' },
    },
    {
      name: 'distributions-in-numbers-only',
      severity: 'error',
      from: { path: '^src/shared/domain/', pathNot: '^src/shared/domain/numbers/|\\.test\\.ts$' },
      to: { path: '^node_modules/@stdlib/' },
    },
    { name: 'shared-stands-alone', severity: 'error', from: { path: '^src/shared/', pathNot: '\\.test\\.ts$' }, to: { path: '^(src/(?!shared/)|server/|jobs/|tests/)' } },
    {
      name: 'shared-needs-zod-only',
      severity: 'error',
      comment: 'The domain has its own rule.',
      from: { path: '^src/shared/(?!domain/)', pathNot: '\\.test\\.ts$' },
      to: { path: '^node_modules/', pathNot: '^node_modules/zod/' },
    },
    { name: 'resolves', severity: 'error', comment: 'An import that leads nowhere escapes every other rule: aliases must be real.', from: {}, to: { couldNotResolve: true } },
    { name: 'env-in-config-only', severity: 'error', from: { path: '^(server|jobs|src|seeds)/', pathNot: '^server/(config\\.ts|boot/)' }, to: { path: '^(node:)?process$' } },
    { name: 'client-no-node', severity: 'error', from: { path: '^src/', pathNot: '\\.test\\.tsx?$' }, to: { dependencyTypes: ['core'] } },
    { name: 'client-not-server', severity: 'error', from: { path: '^src/' }, to: { path: '^(server|jobs|migrations|seeds)/' } },
    { name: 'server-not-client', severity: 'error', from: { path: '^(server|jobs)/' }, to: { path: '^src/(?!shared/)' } },
    { name: 'client-one-way', severity: 'error', from: { path: '^src/(ui|lib)/' }, to: { path: '^src/(features|app)/' } },
    { name: 'features-not-app', severity: 'error', from: { path: '^src/features/' }, to: { path: '^src/app/' } },
    {
      name: 'features-by-front-door',
      severity: 'error',
      from: { path: '^src/features/([^/]+)/' },
      to: { path: '^src/features/', pathNot: ['^src/features/$1/', '^src/features/[^/]+/index\\.ts$'] },
    },
    {
      name: 'slices-by-front-door',
      severity: 'error',
      from: { path: '^server/capabilities/([^/]+)/' },
      to: { path: '^server/capabilities/', pathNot: ['^server/capabilities/$1/', '^server/capabilities/[^/]+/index\\.ts$'] },
    },
    { name: 'others-by-front-door', severity: 'error', from: { path: '^(jobs|seeds|migrations|server/(cli|compose|app|main))' }, to: { path: '^server/capabilities/', pathNot: '^server/capabilities/[^/]+/index\\.ts$' } },
    { name: 'platform-knows-no-slice', severity: 'error', from: { path: '^server/platform/' }, to: { path: '^server/(capabilities|compose|app|main)' } },
    {
      name: 'knex-in-stores-only',
      severity: 'error',
      from: { path: '^server/capabilities/', pathNot: '/(store|read-model|projection)[^/]*\\.ts$' },
      to: { path: '^node_modules/knex/' },
    },
    { name: 'lucia-one-folder', severity: 'error', from: { pathNot: '^server/platform/auth/' }, to: { path: '^node_modules/(lucia|@lucia-auth)/' } },
    { name: 'fakes-stand-outside', severity: 'error', from: { path: '^server/fakes/' }, to: { path: '^server/(capabilities|platform|compose|app|main)' } },
    ...Object.entries(edges.server).map(([from, to]) => slice('server/capabilities', from, to)),
    ...Object.entries(edges.client).map(([from, to]) => slice('src/features', from, to)),
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '^(dist|\\.data)/' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: { exportsFields: ['exports'], conditionNames: ['import', 'node', 'default', 'types'], extensions: ['.ts', '.tsx', '.js', '.mjs'] },
  },
};

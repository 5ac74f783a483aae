/** Which way imports may point. Each rule names what it keeps true. */
const TEST = '\\.(test|spec)\\.tsx?$';

module.exports = {
  forbidden: [
    {
      name: 'engine-is-pure',
      comment: 'engine/src is numerics alone: it runs in a browser, in a worker and in Node.',
      severity: 'error',
      from: { path: '^engine/src/', pathNot: TEST },
      to: { dependencyTypes: ['core'] },
    },
    {
      name: 'engine-knows-no-interface',
      comment: 'The engine knows neither React nor Comlink nor the other workspaces.',
      severity: 'error',
      from: { path: '^engine/src/' },
      to: { path: '^(studio|server)/|(^|/)node_modules/(react|react-dom|react-router|comlink|express)/' },
    },
    {
      name: 'engine-source-stands-alone',
      comment: 'Worker, command line, bench and validation use the numerics, never the other way.',
      severity: 'error',
      from: { path: '^engine/src/', pathNot: TEST },
      to: { path: '^engine/', pathNot: '^engine/src/' },
    },
    {
      name: 'engine-imports-no-workspace',
      severity: 'error',
      from: { path: '^engine/' },
      to: { path: '^(studio|server)/' },
    },
    {
      name: 'odex-behind-one-door',
      comment: 'Everything else integrates through engine/src/integrate.',
      severity: 'error',
      from: { pathNot: '^engine/src/integrate/' },
      to: { path: '(^|/)node_modules/odex/' },
    },
    {
      name: 'engine-door',
      comment: 'Other workspaces see the engine through its doors; a page also starts a worker by its file.',
      severity: 'error',
      from: { path: '^(studio|server)/' },
      to: { path: '^engine/', pathNot: '^engine/(src/index|worker/(index|[a-z-]+-worker))\\.ts$' },
    },
    {
      name: 'studio-sees-the-contract-only',
      comment: 'Of the server, the studio imports what crosses HTTP and nothing else.',
      severity: 'error',
      from: { path: '^studio/' },
      to: { path: '^server/', pathNot: '^server/src/contract/' },
    },
    {
      name: 'server-serves-the-studio-as-files',
      severity: 'error',
      from: { path: '^server/' },
      to: { path: '^studio/' },
    },
    {
      name: 'features-stand-apart',
      comment: 'A feature never imports another: studio/src/app composes them.',
      severity: 'error',
      from: { path: '^studio/src/features/([^/]+)/' },
      to: { path: '^studio/src/features/', pathNot: '^studio/src/features/$1/' },
    },
    {
      name: 'shared-code-knows-no-feature',
      severity: 'error',
      from: { path: '^studio/src/(components|charts|lib|styles)/' },
      to: { path: '^studio/src/(features|app)/' },
    },
    {
      name: 'plotly-behind-one-door',
      comment: 'Numbers, units and labels go into studio/src/charts; nothing else speaks Plotly.',
      severity: 'error',
      from: { pathNot: '^studio/src/charts/' },
      to: { path: '(^|/)node_modules/plotly\\.js' },
    },
    { name: 'no-cycles', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'no-orphans',
      severity: 'error',
      from: {
        orphan: true,
        pathNot: '^studio/public/|\\.d\\.ts$|\\.config\\.(ts|js)$|/tsconfig[^/]*\\.json$|package\\.json$',
      },
      to: {},
    },
    {
      name: 'no-tests-in-the-product',
      severity: 'error',
      from: { pathNot: TEST },
      to: { path: TEST },
    },
    { name: 'resolvable', severity: 'error', from: {}, to: { couldNotResolve: true } },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '(^|/)(dist|test-results|playwright-report)/' },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'module', 'browser', 'default', 'types'],
      extensions: ['.ts', '.tsx', '.js', '.mjs', '.json', '.css', '.d.ts'],
    },
  },
};

/** The directions of the house, checked on the import graph: dynamic imports and re-exports included. */
const arrow = (name, comment, from, to) => ({ name, comment, severity: 'error', from, to });

/** @type {import('dependency-cruiser').IConfiguration} */
module.exports = {
  forbidden: [
    arrow(
      'no-cycles',
      'Files that need each other are one file, or hide a third.',
      {},
      { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
    ),
    arrow(
      'engine-alone',
      'The engine imports the engine, nothing else: data in, verdict out (robust-predicates is its one library).',
      { path: '^services/engine/' },
      { pathNot: ['^services/engine/', '(^|/)node_modules/robust-predicates/'] },
    ),
    arrow(
      'contracts-light',
      'Contracts go to the browser: they import zod, a CSV reader, the engine and each other.',
      { path: '^services/contracts/' },
      { pathNot: ['^services/(contracts|engine)/', '(^|/)node_modules/(zod|papaparse|@types/papaparse)/'] },
    ),
    arrow('components-not-db', 'Components never reach the database.', { path: '^components/' }, { path: '^db/' }),
    arrow(
      'components-not-services',
      'Components use services/engine and services/contracts only.',
      { path: '^components/' },
      { path: '^services/', pathNot: '^services/(engine|contracts)/' },
    ),
    arrow(
      'services-not-pages',
      'Services know nothing of pages and components.',
      { path: '^services/' },
      { path: '^(app|components)/' },
    ),
    arrow(
      'db-below-services',
      'The database layer knows the engine and the contracts, no use-case and no page.',
      { path: '^db/', pathNot: '^db/(seed\\.ts$|seeds/)' },
      { path: '^(app|components|services)/', pathNot: '^services/(engine|contracts)/' },
    ),
    arrow('seeds-not-pages', 'Seeds may use the use-cases, not the pages.', { path: '^db/' }, { path: '^(app|components)/' }),
    arrow('app-not-db', 'Pages and route handlers call use-cases.', { path: '^app/' }, { path: '^db/' }),
    arrow(
      'orm-in-db',
      'Only db/ speaks to the database.',
      { path: '^(app|components|services)/' },
      { path: '(^|/)node_modules/(sequelize|mariadb|umzug)/' },
    ),
    arrow(
      'product-not-tests',
      'The product does not import its tests or its starter.',
      { path: '^(app|components|services|db)/' },
      { path: '^(tests|docker)/' },
    ),
    // The framework itself resolves server-only.
    arrow('resolvable', 'Every import leads somewhere.', {}, { couldNotResolve: true, pathNot: '^server-only$' }),
    arrow(
      'no-development-packages',
      'What production imports is a dependency of production.',
      { path: '^(app|components|services|db)/', pathNot: '\\.d\\.ts$' },
      { dependencyTypes: ['npm-dev'], dependencyTypesNot: ['type-only'] },
    ),
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '^(\\.next|\\.local)/' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
      mainFields: ['module', 'main', 'types'],
    },
  },
};

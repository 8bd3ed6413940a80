/**
 * What may import what: the table of DEVELOPERS.md, enforced by `npm test -- dependencies`.
 * A path is matched from the project's root after `#` imports are resolved.
 */

/** A layer and everything that it must not reach. */
const forbid = (name, from, to, comment) => ({
  name,
  severity: 'error',
  comment,
  from: typeof from === 'string' ? { path: from } : from,
  to: typeof to === 'string' ? { path: to } : to,
});

/** Inside our own folders, `from` may only reach `allowed`. */
const only = (name, from, allowed, comment) =>
  forbid(
    name,
    from,
    {
      path: '^(shared|server|src|migrations|seeders|scripts|tests)/',
      pathNot: `^(${allowed.join('|')})`,
    },
    comment,
  );

const shared = [
  only('units-import-nothing', '^shared/units/', ['shared/units/'], 'Units stand alone.'),
  only('errors-import-nothing', '^shared/errors/', ['shared/errors/'], 'Errors stand alone.'),
  only(
    'schemas-import-units-and-errors',
    '^shared/schemas/',
    ['shared/schemas/', 'shared/units/', 'shared/errors/'],
    'Contracts know units, errors and zod.',
  ),
  only(
    'sparse-imports-errors',
    '^shared/numerics/sparse/',
    ['shared/numerics/sparse/', 'shared/errors/'],
    'The lowest numerical layer.',
  ),
  only(
    'ordering-imports-lower-layers',
    '^shared/numerics/ordering/',
    ['shared/numerics/(ordering|sparse)/', 'shared/errors/'],
    'kernels, sparse ← ordering ← factor ← chains ← eigen.',
  ),
  only(
    'kernels-import-errors',
    '^shared/numerics/kernels/',
    ['shared/numerics/kernels/', 'shared/errors/'],
    'Loops over one memory; they know no matrix.',
  ),
  only(
    'factor-imports-lower-layers',
    '^shared/numerics/factor/',
    ['shared/numerics/(factor|ordering|sparse|kernels)/', 'shared/errors/'],
    'kernels, sparse ← ordering ← factor ← chains ← eigen.',
  ),
  only(
    'chains-import-lower-layers',
    '^shared/numerics/chains/',
    ['shared/numerics/(chains|factor|ordering|sparse|kernels)/', 'shared/errors/'],
    'kernels, sparse ← ordering ← factor ← chains ← eigen.',
  ),
  only(
    'numerics-import-numerics',
    '^shared/numerics/',
    ['shared/numerics/', 'shared/errors/'],
    'Kernels know vectors and matrices, never a frame.',
  ),
  only(
    'frame-imports-schemas-and-numerics',
    '^shared/frame/',
    ['shared/frame/', 'shared/schemas/', 'shared/numerics/', 'shared/units/', 'shared/errors/'],
    'Document → K, M, C; knows nothing of solving.',
  ),
  only('shared-imports-shared', '^shared/', ['shared/'], 'Nothing imports upward.'),
  forbid(
    'shared-runs-anywhere',
    '^shared/',
    { dependencyTypes: ['core'] },
    'shared runs in the browser too: no Node builtins.',
  ),
];

const server = [
  only('server-imports-shared', '^server/', ['server/', 'shared/'], 'src and server never meet.'),
  only('config-is-lowest', '^server/config/', ['server/config/', 'shared/'], 'Config is lowest.'),
  forbid(
    'models-know-no-higher-layer',
    '^server/models/',
    '^server/(routes|policies|commands|presenters|middlewares|workers|mail)/',
    'Models know tables only.',
  ),
  forbid(
    'mail-knows-no-higher-layer',
    '^server/mail/',
    '^server/(routes|policies|commands|presenters|middlewares|workers)/',
    'Mail sends what it is given.',
  ),
  forbid(
    'policies-know-models-only',
    '^server/policies/',
    '^server/(routes|commands|presenters|middlewares|workers|mail)/',
    'Policies decide; they do nothing.',
  ),
  forbid(
    'commands-know-no-wire',
    '^server/(commands|workers)/',
    '^server/(routes|presenters|middlewares)/',
    'Commands own the transaction and never see a request.',
  ),
  forbid(
    'presenters-only-present',
    '^server/presenters/',
    '^server/(routes|commands|middlewares|workers|mail)/',
    'Presenters list fields and abilities.',
  ),
  forbid(
    'middlewares-know-no-route',
    '^server/middlewares/',
    '^server/(routes|commands)/',
    'Middlewares serve every route.',
  ),
  forbid(
    'routes-are-mounted-once',
    { path: '^server/(?!routes/)[^/]+/' },
    '^server/routes/',
    'Only the application file mounts routes.',
  ),
];

const src = [
  only('src-imports-shared', '^src/', ['src/', 'shared/'], 'src and server never meet.'),
  forbid(
    'features-never-import-each-other',
    { path: '^src/features/([^/]+)/' },
    { path: '^src/features/', pathNot: '^src/features/$1/' },
    'Only app composes features.',
  ),
  forbid(
    'only-app-imports-app',
    { path: '^src/', pathNot: '^src/(app/|main\\.tsx$)' },
    '^src/app/',
    'app is the top of the client.',
  ),
  forbid(
    'reusable-pieces-know-no-feature',
    '^src/(components|hooks|lib|workers|viewer)/',
    '^src/features/',
    'Reusable pieces are below features.',
  ),
  forbid(
    'reusable-pieces-know-no-viewer',
    '^src/(components|hooks|lib|workers)/',
    '^src/viewer/',
    'The scene is used by features only.',
  ),
  only(
    'viewer-imports-lib',
    '^src/viewer/',
    ['src/viewer/', 'src/lib/', 'shared/'],
    'The scene knows data and small functions only.',
  ),
];

const rest = [
  only(
    'migrations-stand-alone',
    '^migrations/',
    ['migrations/'],
    'A migration never changes later.',
  ),
  only(
    'seeders-import-server',
    '^seeders/',
    ['seeders/', 'server/', 'shared/'],
    'Demo data goes through the same commands as everybody.',
  ),
  forbid(
    'nothing-imports-tests',
    { pathNot: '^(tests/|playwright\\.config|vitest\\.config)' },
    '^tests/',
    'The product never needs its tests.',
  ),
  {
    name: 'no-cycles',
    severity: 'error',
    comment: 'A cycle hides which of two files is the lower one.',
    from: {},
    to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
  },
  {
    name: 'everything-resolves',
    severity: 'error',
    comment: 'A wrong path, or a package that package.json does not name.',
    from: {},
    to: { couldNotResolve: true },
  },
  {
    name: 'product-needs-no-development-package',
    severity: 'error',
    comment: 'What the product runs is in dependencies.',
    from: { path: '^(shared|server|src|migrations|seeders)/' },
    to: { dependencyTypes: ['npm-dev'], dependencyTypesNot: ['type-only'], pathNot: '@types/' },
  },
];

module.exports = {
  forbidden: [...shared, ...server, ...src, ...rest],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '^(dist|coverage)/' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.base.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
      extensions: ['.ts', '.tsx', '.mjs', '.js', '.cjs', '.json'],
      mainFields: ['module', 'main', 'types'],
    },
  },
};

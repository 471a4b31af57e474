// The import rules of the project. `npm run deps` checks them; tests/tooling shows that each can fail.

/** Areas in dependency order: each may import those before it. */
const AREAS = [
  'accounts',
  'installations',
  'people',
  'safety',
  'frames',
  'split',
  'hanging',
  'materials',
  'crib',
  'travellers',
  'schedule',
  'progress',
  'reports',
];
const MODULES = [...AREAS, 'mail'];
const FEATURES =
  '(accounts|bench|briefings|crib|door|frames|installations|muster|people-plan|planning|progress|projector|safety-desk|split|stop|travellers)';

const OURS = '^(shared|server|src)/';
const KNOWN_FOLDERS = [
  `^shared/(kernel|contracts|${AREAS.join('|')})/`,
  '^server/(http|db|realtime|jobs|cli)/',
  '^server/[^/]+\\.ts$',
  `^server/modules/(${MODULES.join('|')})/`,
  '^server/modules/index\\.ts$',
  '^src/(app|components|lib|styles)/',
  `^src/features/${FEATURES}/`,
  '^src/main\\.tsx$',
];

const laterAreas = AREAS.map((area, index) => ({
  name: `shared-order-${area}`,
  comment: 'An area of shared/ imports only the areas before it.',
  severity: 'error',
  from: { path: `^shared/${area}/` },
  to: { path: `^shared/(${AREAS.slice(index + 1).join('|') || 'none'})/` },
}));

module.exports = {
  forbidden: [
    ...laterAreas,
    {
      name: 'no-cycles',
      severity: 'error',
      // What is gone after compiling makes no cycle.
      from: {},
      to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
    },
    {
      name: 'shared-is-pure',
      comment: 'shared/ runs everywhere: it imports shared/, zod and date-fns, nothing else.',
      severity: 'error',
      from: { path: '^shared/' },
      to: { pathNot: '^shared/|node_modules/(zod|date-fns|@date-fns/tz)/' },
    },
    {
      name: 'areas-know-no-contracts',
      comment: 'Contracts are made of the areas, not the other way round; only error codes are common.',
      severity: 'error',
      from: { path: `^shared/(kernel|${AREAS.join('|')})/` },
      to: {
        path: '^shared/contracts/',
        pathNot: '^shared/contracts/errors\\.ts$',
        dependencyTypesNot: ['type-only'],
      },
    },
    {
      name: 'kernel-knows-nobody',
      severity: 'error',
      from: { path: '^shared/kernel/' },
      to: { path: '^shared/', pathNot: '^shared/kernel/' },
    },
    {
      name: 'client-knows-no-server',
      severity: 'error',
      from: { path: '^src/' },
      to: { path: '^server/' },
    },
    {
      name: 'server-knows-no-client',
      severity: 'error',
      from: { path: '^server/' },
      to: { path: '^src/' },
    },
    {
      name: 'features-are-strangers',
      severity: 'error',
      from: { path: '^src/features/([^/]+)/' },
      to: { path: '^src/features/', pathNot: '^src/features/$1/' },
    },
    {
      name: 'common-parts-know-no-feature',
      severity: 'error',
      from: { path: '^src/(components|lib)/' },
      to: { path: '^src/(features|app)/' },
    },
    {
      name: 'features-know-no-page',
      severity: 'error',
      from: { path: '^src/features/' },
      to: { path: '^src/app/' },
    },
    {
      name: 'modules-meet-at-the-index',
      comment: 'Entities are the tables, which the list of entities names; all else goes through index.ts.',
      severity: 'error',
      from: { path: '^server/modules/([^/]+)/' },
      to: {
        path: '^server/modules/[^/]+/',
        pathNot: '^server/modules/$1/|^server/modules/[^/]+/index\\.ts$|\\.entity\\.ts$',
      },
    },
    {
      name: 'plumbing-meets-modules-at-the-index',
      severity: 'error',
      from: { path: '^server/', pathNot: '^server/modules/' },
      to: { path: '^server/modules/[^/]+/', pathNot: '/index\\.ts$|\\.entity\\.ts$' },
    },
    {
      name: 'typeorm-stays-in-its-place',
      severity: 'error',
      from: {
        path: '^server/',
        pathNot: '^server/db/|\\.(entity|repository)\\.ts$|^server/cli/generate-migration\\.ts$',
      },
      to: { path: 'node_modules/typeorm/', dependencyTypesNot: ['type-only'] },
    },
    {
      name: 'express-stays-in-its-place',
      severity: 'error',
      from: { path: '^server/', pathNot: '^server/(http|realtime)/|^server/app\\.ts$|\\.routes\\.ts$' },
      to: {
        path: 'node_modules/(@types/)?(express|express-session)/',
        dependencyTypesNot: ['type-only'],
      },
    },
    {
      name: 'sockets-stay-in-their-place',
      severity: 'error',
      from: { path: '^server/', pathNot: '^server/realtime/' },
      to: { path: 'node_modules/socket\\.io/' },
    },
    // A new folder has to be written into DEVELOPERS.md and into this file first. Three rules, because a file may
    // import something, be imported, or neither.
    { name: 'a-folder-on-no-list', severity: 'error', from: { path: OURS, pathNot: KNOWN_FOLDERS }, to: {} },
    {
      name: 'a-folder-on-no-list-imported',
      severity: 'error',
      from: {},
      to: { path: OURS, pathNot: KNOWN_FOLDERS },
    },
    {
      name: 'a-folder-on-no-list-alone',
      severity: 'error',
      from: { orphan: true, path: OURS, pathNot: KNOWN_FOLDERS },
      to: {},
    },
    {
      name: 'not-to-unresolvable',
      severity: 'error',
      from: {},
      to: { couldNotResolve: true },
    },
    {
      name: 'listed-packages-only',
      severity: 'error',
      from: { path: '^(shared|server|src)/' },
      to: { dependencyTypes: ['npm-no-pkg', 'npm-unknown'] },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
    },
  },
};

/*
 * Who may import whom. One row a room: `ours` are the rooms it may import (itself always), `npm` the packages (undefined:
 * any), `node` whether Node's own modules are allowed. Tests beside a file may use what they need.
 */
const NUCLEUS = ['lib/env', 'lib/errors', 'lib/log'];
const UI_PACKAGES = [
  'react',
  'react-dom',
  'next',
  'swr',
  'zod',
  'radix-ui',
  'lucide-react',
  'react-hook-form',
  'react-dropzone',
  '@tanstack/react-table',
  'recharts',
  'pdfjs-dist',
];

export const ROOMS = [
  { room: 'lib/domain', ours: [], npm: ['jstat'], node: false },
  { room: 'lib/reading', ours: ['lib/domain'], npm: ['papaparse'], node: false },
  { room: 'lib/schemas', ours: ['lib/access', 'lib/domain'], npm: ['zod'], node: false },
  { room: 'lib/access', ours: ['lib/schemas', 'lib/domain'], npm: ['zod'], node: false },
  { room: 'lib/services', ours: ['lib/domain', 'lib/schemas', ...NUCLEUS], node: true },
  { room: 'lib/env', ours: [], npm: ['zod', 'pino'], node: true },
  { room: 'lib/errors', ours: [], npm: ['zod', 'pino'], node: true },
  { room: 'lib/log', ours: ['lib/env'], npm: ['zod', 'pino'], node: true },
  { room: 'db', ours: ['lib/domain', 'lib/env'], npm: ['drizzle-orm', 'postgres'], node: true },
  {
    room: 'lib/data',
    ours: [
      'lib/domain',
      'lib/reading',
      'lib/schemas',
      'lib/access',
      'lib/services',
      // Templates without data of their own: the outbox keeps the finished message, so a link's secret is in no job.
      'lib/emails',
      'lib/jobs/names',
      ...NUCLEUS,
      'db',
    ],
    npm: [
      'drizzle-orm',
      'zod',
      'date-fns',
      '@date-fns/tz',
      'lucia',
      '@lucia-auth/adapter-drizzle',
      '@node-rs/argon2',
      'rate-limiter-flexible',
    ],
    node: true,
  },
  {
    room: 'lib/jobs',
    ours: ['lib/data', 'lib/domain', 'lib/reading', 'lib/schemas', 'lib/services', 'lib/emails', ...NUCLEUS],
    npm: ['zod'],
    node: true,
  },
  {
    room: 'lib/emails',
    ours: ['lib/domain', 'lib/schemas'],
    npm: ['react', '@react-email/components', '@react-email/render'],
    node: false,
  },
  { room: 'lib/ui', ours: ['lib/domain', 'lib/schemas', 'lib/access'], npm: UI_PACKAGES, node: false },
  {
    room: 'app',
    ours: ['lib/data', 'lib/ui', 'lib/schemas', 'lib/access', 'lib/domain', ...NUCLEUS],
    npm: [...UI_PACKAGES, 'server-only'],
    node: true,
  },
  { room: 'fake-services', ours: ['fixtures'], npm: [], node: true },
];

/** Single files that a room's row would wrongly stop. The reason stands with each. */
const EXCEPTIONS = {
  // The demo is made through the verbs, as people would make it.
  db: ['db/seed'],
  // The gallery shows every e-mail.
  app: ['app/gallery'],
  // Runs after the packages are there.
  'fake-services': ['fake-services/support/bundleWorker'],
};

const escaped = (text) => text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
const pathOf = (room) => `^${escaped(room)}(/|\\.|$)`;
const anyOf = (rooms) => rooms.map(pathOf).join('|');
const packages = (names) => names.map((name) => `(^|/)node_modules/(@types/)?${escaped(name)}/`).join('|');
const NPM = ['npm', 'npm-dev', 'npm-optional', 'npm-peer', 'npm-bundled', 'npm-no-pkg', 'npm-unknown'];
const TESTS = '\\.test\\.tsx?$';
const OURS = '^(app|lib|db|fixtures|fake-services|tests|proxy\\.ts|instrumentation\\.ts)(/|$)';
// proxy.ts and instrumentation.ts are Next's own doors into the web process and belong to app.
const fromOf = (room) => (room === 'app' ? `${pathOf('app')}|^(proxy|instrumentation)\\.ts$` : pathOf(room));

function rulesOf({ room, ours, npm, node }) {
  const exempt = [TESTS, ...(EXCEPTIONS[room] ?? []).map(pathOf)];
  const from = { path: fromOf(room), pathNot: exempt };
  const name = room.replaceAll('/', '-');
  const rules = [{ name: `${name}-rooms`, from, to: { path: OURS, pathNot: [fromOf(room), ...ours.map(pathOf)] } }];
  if (npm !== undefined) {
    rules.push({
      name: `${name}-packages`,
      from,
      to: { dependencyTypes: NPM, ...(npm.length > 0 ? { pathNot: packages(npm) } : {}) },
    });
  }
  if (!node) rules.push({ name: `${name}-node`, from, to: { dependencyTypes: ['core'] } });
  return rules;
}

const PEOPLE_ROOMS = ['lib/data/people', 'lib/data/mail'];
const product = { path: '^(app|lib|db)/|^(proxy|instrumentation)\\.ts$', pathNot: TESTS };

const EXTRA_RULES = [
  {
    name: 'seed-rooms',
    from: { path: pathOf('db/seed'), pathNot: TESTS },
    to: { path: anyOf(['app', 'lib/ui', 'fake-services', 'tests', 'fixtures']) },
  },
  {
    name: 'gallery-rooms',
    from: { path: pathOf('app/gallery'), pathNot: TESTS },
    to: { path: anyOf(['db', 'lib/services', 'lib/reading', 'lib/jobs', 'lib/data']) },
  },
  { name: 'product-without-tests', from: product, to: { path: anyOf(['tests', 'fixtures', 'fake-services']) } },
  {
    name: 'lucia-in-people-only',
    from: { path: product.path, pathNot: [TESTS, pathOf('lib/data/people')] },
    to: { path: packages(['lucia', '@lucia-auth/adapter-drizzle']) },
  },
  {
    name: 'drizzle-not-in-app',
    from: { path: fromOf('app'), pathNot: TESTS },
    to: { path: packages(['drizzle-orm', 'postgres']) },
  },
  {
    name: 'people-tables',
    from: { path: '^lib/', pathNot: [TESTS, ...PEOPLE_ROOMS.map(pathOf)] },
    to: { path: '^db/schema/(people|mail)\\.ts$' },
  },
  { name: 'no-cycles', from: { path: '^(app|lib|db|fake-services|tests)/' }, to: { circular: true } },
  {
    name: 'resolvable',
    from: { path: OURS, pathNot: '^fixtures/' },
    to: { couldNotResolve: true, dependencyTypesNot: ['core'] },
  },
];

const RULES = [...ROOMS.flatMap(rulesOf), ...EXTRA_RULES].map((rule) => ({ severity: 'error', ...rule }));
export const RULE_NAMES = RULES.map(({ name }) => name);

export default {
  forbidden: RULES,
  options: {
    doNotFollow: { path: '(^|/)node_modules/' },
    exclude: { path: '(^|/)(\\.next|\\.data|tests/\\.out)/' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    preserveSymlinks: true,
    enhancedResolveOptions: {
      extensions: ['.ts', '.tsx', '.mjs', '.js', '.json', '.css'],
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
    },
  },
};

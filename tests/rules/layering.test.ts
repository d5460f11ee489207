import { mkdir, mkdtemp, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { cruiseTree } from './cruise.mjs';
import { RULE_NAMES } from './layering.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));
let folder: string;

async function writeTree(name: string, files: Readonly<Record<string, string>>): Promise<string> {
  const tree = path.join(folder, name);
  for (const [file, text] of Object.entries(files)) {
    await mkdir(path.join(tree, path.dirname(file)), { recursive: true });
    await writeFile(path.join(tree, file), text);
  }
  await symlink(path.join(root, 'node_modules'), path.join(tree, 'node_modules'));
  await writeFile(path.join(tree, 'package.json'), '{ "name": "planted", "type": "module" }');
  const compilerOptions = {
    module: 'esnext',
    moduleResolution: 'bundler',
    jsx: 'react-jsx',
    paths: { '@/*': ['./*'] },
  };
  await writeFile(path.join(tree, 'tsconfig.json'), JSON.stringify({ compilerOptions }));
  return tree;
}

const uses = (...modules: string[]) =>
  `${modules.map((each) => `import '${each}';`).join('\n')}\nexport const here = 1;\n`;

/** One honest file a room, each importing about everything its row allows. */
const CLEAN = {
  'lib/domain/ph.ts': uses('./drift', 'jstat'),
  'lib/domain/drift.ts': uses(),
  'lib/domain/ph.test.ts': uses('node:fs', './ph', '@/tests/support/make', 'vitest'),
  'lib/reading/rows.ts': uses('@/lib/domain/ph', 'papaparse'),
  'lib/schemas/plot.ts': uses('@/lib/domain/ph', 'zod'),
  'lib/access/table.ts': uses('@/lib/schemas/plot'),
  'lib/env.ts': uses('zod'),
  'lib/errors.ts': uses(),
  'lib/log.ts': uses('./env', 'pino'),
  'lib/services/storage/s3.ts': uses('@/lib/env', '@/lib/domain/ph', '@aws-sdk/client-s3', 'node:crypto'),
  'lib/emails/reminder.tsx': uses('@react-email/components', '@/lib/schemas/plot'),
  'lib/jobs/names.ts': uses('zod', '@/lib/schemas/plot'),
  'lib/jobs/readReport/handler.ts': uses(
    '@/lib/data/plots/list',
    '@/lib/reading/rows',
    '@/lib/services/storage/s3',
    '@/lib/emails/reminder',
  ),
  'lib/data/plots/list.ts': uses(
    '@/db/schema/sites',
    '@/lib/jobs/names',
    '@/lib/access/table',
    '@/lib/services/storage/s3',
    'drizzle-orm',
  ),
  'lib/data/people/session.ts': uses('lucia', '@/db/schema/people'),
  'lib/data/mail/claim.ts': uses('@/db/schema/people'),
  'lib/ui/chart/line.tsx': uses('react', 'recharts', '@/lib/domain/ph', '@/lib/access/table'),
  'db/schema/people.ts': uses('drizzle-orm/pg-core'),
  'db/schema/sites.ts': uses('drizzle-orm/pg-core', '@/lib/domain/ph'),
  'db/seed.ts': uses('@/lib/data/plots/list', '@/lib/data/people/session', 'node:fs'),
  'app/page.tsx': uses('@/lib/data/plots/list', '@/lib/ui/chart/line', '@/lib/env', 'next/link', 'swr'),
  'app/gallery/page.tsx': uses('@/lib/emails/reminder', '@/lib/ui/chart/line'),
  'proxy.ts': uses('@/lib/env', 'next/server'),
  'fake-services/start.mjs': uses('./mail.mjs', 'node:http'),
  'fake-services/mail.mjs': uses('node:fs'),
  'fake-services/support/bundleWorker.mjs': uses('esbuild'),
  'tests/support/make.ts': uses('@/lib/data/plots/list', '@/db/schema/sites', 'postgres'),
  'fixtures/answers.json': '{}',
};

/** For each rule a file that breaks it and what it must not import. */
const PLANTED: Readonly<Record<string, readonly [file: string, imports: string]>> = {
  'lib-domain-rooms': ['lib/domain/planted-room.ts', '@/lib/schemas/plot'],
  'lib-domain-packages': ['lib/domain/planted-package.ts', 'zod'],
  'lib-domain-node': ['lib/domain/planted-node.ts', 'node:fs'],
  'lib-reading-rooms': ['lib/reading/planted-room.ts', '@/lib/services/storage/s3'],
  'lib-reading-packages': ['lib/reading/planted-package.ts', 'pdfjs-dist'],
  'lib-reading-node': ['lib/reading/planted-node.ts', 'node:buffer'],
  'lib-schemas-rooms': ['lib/schemas/planted-room.ts', '@/lib/env'],
  'lib-schemas-packages': ['lib/schemas/planted-package.ts', 'react'],
  'lib-schemas-node': ['lib/schemas/planted-node.ts', 'crypto'],
  'lib-access-rooms': ['lib/access/planted-room.ts', '@/lib/data/plots/list'],
  'lib-access-packages': ['lib/access/planted-package.ts', 'drizzle-orm'],
  'lib-access-node': ['lib/access/planted-node.ts', 'node:path'],
  'lib-services-rooms': ['lib/services/planted-room.ts', '@/db/schema/sites'],
  'lib-env-rooms': ['lib/env/planted-room.ts', '@/lib/domain/ph'],
  'lib-env-packages': ['lib/env/planted-package.ts', 'next'],
  'lib-errors-rooms': ['lib/errors/planted-room.ts', '@/lib/domain/ph'],
  'lib-errors-packages': ['lib/errors/planted-package.ts', 'next'],
  'lib-log-rooms': ['lib/log/planted-room.ts', '@/lib/errors'],
  'lib-log-packages': ['lib/log/planted-package.ts', 'next'],
  'db-rooms': ['db/planted-room.ts', '@/lib/schemas/plot'],
  'db-packages': ['db/planted-package.ts', 'lucide-react'],
  'lib-data-rooms': ['lib/data/plots/planted-room.ts', '@/lib/jobs/readReport/handler'],
  'lib-data-packages': ['lib/data/plots/planted-package.ts', '@aws-sdk/client-s3'],
  'lib-jobs-rooms': ['lib/jobs/planted-room.ts', '@/db/schema/sites'],
  'lib-jobs-packages': ['lib/jobs/planted-package.ts', 'pg-boss'],
  'lib-emails-rooms': ['lib/emails/planted-room.tsx', '@/lib/services/storage/s3'],
  'lib-emails-packages': ['lib/emails/planted-package.tsx', 'resend'],
  'lib-emails-node': ['lib/emails/planted-node.tsx', 'node:fs'],
  'lib-ui-rooms': ['lib/ui/planted-room.tsx', '@/lib/data/plots/list'],
  'lib-ui-packages': ['lib/ui/planted-package.tsx', 'postgres'],
  'lib-ui-node': ['lib/ui/planted-node.tsx', 'node:fs'],
  'app-rooms': ['app/planted-room.tsx', '@/lib/services/storage/s3'],
  'app-packages': ['app/planted-package.tsx', 'resend'],
  'fake-services-rooms': ['fake-services/planted-room.mjs', '../lib/domain/ph.ts'],
  'fake-services-packages': ['fake-services/planted-package.mjs', 'postgres'],
  'seed-rooms': ['db/seed/planted.ts', '@/lib/ui/chart/line'],
  'gallery-rooms': ['app/gallery/planted.tsx', '@/lib/data/plots/list'],
  'product-without-tests': ['lib/data/plots/planted-tests.ts', '@/tests/support/make'],
  'lucia-in-people-only': ['lib/data/plots/planted-lucia.ts', 'lucia'],
  'drizzle-not-in-app': ['app/planted-drizzle.tsx', 'drizzle-orm'],
  'people-tables': ['lib/data/plots/planted-people.ts', '@/db/schema/people'],
  'no-cycles': ['lib/domain/planted-cycle.ts', './planted-cycle-back'],
  resolvable: ['lib/domain/planted-nowhere.ts', './does-not-exist'],
};

const OTHER_HALVES = { 'lib/domain/planted-cycle-back.ts': uses('./planted-cycle') };

beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'layering-'));
});
afterAll(() => rm(folder, { recursive: true }));

describe('the layering check', () => {
  it('finds nothing in a tree where every room keeps to its row', async () => {
    const { modules, violations } = await cruiseTree(await writeTree('clean', CLEAN));
    expect(violations).toEqual([]);
    expect(modules).toBe(Object.keys(CLEAN).filter((file) => !file.endsWith('.json')).length);
  });

  it('has a planted violation for every rule', () => {
    expect(Object.keys(PLANTED).sort()).toEqual([...RULE_NAMES].sort());
  });

  describe('with one violation of each rule planted', () => {
    let found: { rule: string; from: string }[];
    beforeAll(async () => {
      const planted = Object.fromEntries(Object.values(PLANTED).map(([file, imports]) => [file, uses(imports)]));
      found = (await cruiseTree(await writeTree('planted', { ...CLEAN, ...planted, ...OTHER_HALVES }))).violations;
    });

    it.each(Object.entries(PLANTED))('catches %s', (rule, [file]) => {
      // A cycle is reported at one of its files only; the other half is named after the first.
      const name = file.replace(/\.\w+$/, '');
      expect(found.filter(({ from }) => from.startsWith(name)).map((each) => each.rule)).toContain(rule);
    });

    it('blames no file that keeps the rules', () => {
      const guilty = new Set([...Object.values(PLANTED).map(([file]) => file), ...Object.keys(OTHER_HALVES)]);
      expect(found.filter(({ from }) => !guilty.has(from))).toEqual([]);
    });
  });

  it('refuses to call a tree clean in which it saw nothing', async () => {
    const tree = await writeTree('empty', { 'lib/nothing.txt': '', 'elsewhere/code.ts': uses() });
    await expect(cruiseTree(tree)).rejects.toThrow('0 modules');
  });
});

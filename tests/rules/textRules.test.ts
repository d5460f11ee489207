import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import {
  clockAndChanceInjected,
  documentedPathsExist,
  environmentInOnePlace,
  filesAreSmall,
  noRawHtml,
  noRawSql,
  peopleTablesAtHome,
} from './textRules.mjs';

let root: string;

async function write(file: string, text: string): Promise<void> {
  await mkdir(path.join(root, path.dirname(file)), { recursive: true });
  await writeFile(path.join(root, file), text);
}

beforeEach(async () => {
  root = await mkdtemp(path.join(tmpdir(), 'rules-'));
});
afterEach(() => rm(root, { recursive: true }));

it('finds process.env outside lib/env.ts, not in tests or comments', async () => {
  await write('lib/env.ts', 'export const all = process.env;');
  await write('lib/x.test.ts', 'process.env.A = "1";');
  await write('app/page.tsx', '// process.env is not for here\nexport const a = process.env.SECRET;');
  expect(environmentInOnePlace(root)).toEqual(['app/page.tsx:2: process.env is read in lib/env.ts only']);
});

it('finds a clock or chance taken in pure code only', async () => {
  await write(
    'lib/domain/a.ts',
    'const a = new Date();\nconst b = new Date(2026, 1, 1);\nconst c = Math.random();\nconst d = Date.now();',
  );
  await write('lib/services/clock/now.ts', 'export const now = () => new Date();');
  expect(clockAndChanceInjected(root).map((each) => each.split(': ')[0])).toEqual([
    'lib/domain/a.ts:1',
    'lib/domain/a.ts:3',
    'lib/domain/a.ts:4',
  ]);
});

it('finds SQL and HTML made from text', async () => {
  await write('lib/data/a.ts', 'sql.raw(x);\nclient.unsafe(y);');
  await write('app/a.tsx', '<p dangerouslySetInnerHTML={{ __html: x }} />');
  expect(noRawSql(root)).toHaveLength(2);
  expect(noRawHtml(root)).toHaveLength(1);
});

it('finds tables of people used outside their rooms, by any import of the schema', async () => {
  await write('lib/data/people/a.ts', "import { person } from '@/db/schema';");
  await write('lib/data/mail/a.ts', "import { outbox, person } from '@/db/schema';");
  await write('lib/data/plots/fine.ts', "import { personalNote, plot } from '@/db/schema';");
  await write('lib/data/plots/one.ts', "import {\n  plot,\n  session as s,\n} from '@/db/schema';");
  await write('lib/data/plots/two.ts', "import * as schema from '../../../db/schema';");
  expect(peopleTablesAtHome(root)).toEqual([
    'lib/data/plots/one.ts: session belongs to lib/data/people and lib/data/mail',
    'lib/data/plots/two.ts: name the tables it needs instead of taking the whole schema',
  ]);
});

it('finds a file of more than 400 lines', async () => {
  await write('lib/long.ts', 'x;\n'.repeat(401));
  await write('lib/just.ts', 'x;\n'.repeat(400));
  expect(filesAreSmall(root)).toEqual(['lib/long.ts: 401 lines; split it (at most 400)']);
});

it('finds paths in the texts that lead nowhere', async () => {
  await write('lib/domain/ph.ts', '');
  await write('app/(public)/guide/page.tsx', '');
  await write('README.md', '`lib/domain/ph.ts` `npm start` `text/csv` `lib/gone.ts` `app/(public)/guide`');
  expect(documentedPathsExist(root)).toEqual(['README.md:1: lib/gone.ts does not exist', 'DEVELOPERS.md is missing']);
});

import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import path from 'node:path';

const SKIPPED = new Set(['node_modules', '.next', '.data', '.out', '.git']);
const LONGEST = 400;
const CODE = /\.(tsx?|mjs)$/;
const TEST = /\.(test|e2e)\.tsx?$/;

function* filesUnder(root, place) {
  const full = path.join(root, place);
  if (!existsSync(full)) return;
  if (!statSync(full).isDirectory()) {
    yield place;
    return;
  }
  for (const name of readdirSync(full).sort()) {
    if (!SKIPPED.has(name)) yield* filesUnder(root, place === '.' ? name : `${place}/${name}`);
  }
}

/** The lines of the code files under `places` that match, as "file:line: why". */
function linesMatching({ root, places, pattern, why, except = [] }) {
  const findings = [];
  for (const file of places.flatMap((place) => [...filesUnder(root, place)])) {
    if (!CODE.test(file) || TEST.test(file) || except.includes(file)) continue;
    readFileSync(path.join(root, file), 'utf8')
      .split('\n')
      .forEach((line, index) => {
        if (pattern.test(line) && !/^\s*(\/\/|\*|\/\*)/.test(line)) findings.push(`${file}:${index + 1}: ${why}`);
      });
  }
  return findings;
}

const PRODUCT = ['app', 'lib', 'db', 'proxy.ts', 'instrumentation.ts'];

export const environmentInOnePlace = (root) =>
  linesMatching({
    root,
    places: PRODUCT,
    pattern: /process\.env\b/,
    why: 'process.env is read in lib/env.ts only',
    except: ['lib/env.ts'],
  });

export const clockAndChanceInjected = (root) =>
  linesMatching({
    root,
    places: ['lib/domain', 'lib/reading'],
    pattern: /new Date\(\s*\)|Date\.now\(|Math\.random\(|performance\.now\(|randomUUID\(/,
    why: 'time and chance are given to pure code, not taken by it',
  });

export const noRawSql = (root) =>
  linesMatching({
    root,
    places: PRODUCT,
    pattern: /\bsql\.raw\b|\.unsafe\(/,
    why: 'SQL is built with parameters, never from text',
    // The queue library hands over its own SQL as text with parameters; this is the one adapter that passes it on.
    except: ['lib/services/queue/queue.ts'],
  });

export const noRawHtml = (root) =>
  linesMatching({
    root,
    places: PRODUCT,
    pattern: /dangerouslySetInnerHTML/,
    why: 'no HTML is set from text',
  });

const PEOPLE_TABLES = [
  'person',
  'session',
  'token',
  'signInAttempt',
  'outbox',
  'outboxItem',
  'mailPreference',
  'suppression',
  'webhookEvent',
  'idempotencyKey',
];
const SCHEMA_IMPORT =
  /import\s+(type\s+)?(?:\{([^}]*)\}|\*\s+as\s+\w+)\s+from\s+'(@\/db\/schema[^']*|(?:\.\.\/)+db\/schema[^']*)'/g;

/** The schema is imported through one index, so the names are looked at, not only the files. */
export function peopleTablesAtHome(root) {
  const findings = [];
  for (const file of filesUnder(root, 'lib')) {
    if (!CODE.test(file) || TEST.test(file) || /^lib\/data\/(people|mail)\//.test(file)) continue;
    const text = readFileSync(path.join(root, file), 'utf8');
    for (const [, , names] of text.matchAll(SCHEMA_IMPORT)) {
      if (names === undefined) findings.push(`${file}: name the tables it needs instead of taking the whole schema`);
      for (const name of (names ?? '').split(',').map(
        (each) =>
          each
            .trim()
            .replace(/^type\s+/, '')
            .split(/\s+as\s+/)[0],
      )) {
        if (PEOPLE_TABLES.includes(name))
          findings.push(`${file}: ${name} belongs to lib/data/people and lib/data/mail`);
      }
    }
  }
  return findings;
}

export function filesAreSmall(root) {
  const places = ['app', 'lib', 'db', 'fake-services', 'tests', 'fixtures', 'proxy.ts', 'instrumentation.ts'];
  return places
    .flatMap((place) => [...filesUnder(root, place)])
    .filter((file) => /\.(tsx?|mjs|css)$/.test(file))
    .map((file) => ({ file, lines: readFileSync(path.join(root, file), 'utf8').trimEnd().split('\n').length }))
    .filter(({ lines }) => lines > LONGEST)
    .map(({ file, lines }) => `${file}: ${lines} lines; split it (at most ${LONGEST})`);
}

/** Backticked paths in the project's texts: anything with a folder in it, or a file that stands at the top. */
export function documentedPathsExist(root) {
  const findings = [];
  const top = new Set(readdirSync(root));
  for (const text of ['README.md', 'DEVELOPERS.md']) {
    if (!top.has(text)) {
      findings.push(`${text} is missing`);
      continue;
    }
    const lines = readFileSync(path.join(root, text), 'utf8').split('\n');
    lines.forEach((line, index) => {
      for (const [, quoted] of line.matchAll(/`([^`]+)`/g)) {
        if (!/^\.?[\w@()[\]-][\w.@()[\]/-]*$/.test(quoted)) continue;
        const first = quoted.split('/')[0];
        const isPath = quoted.includes('/') ? top.has(first) || /\.\w{1,5}$/.test(quoted) : /^[A-Z]+\.md$/.test(quoted);
        if (isPath && !existsSync(path.join(root, quoted)))
          findings.push(`${text}:${index + 1}: ${quoted} does not exist`);
      }
    });
  }
  return findings;
}

export const TEXT_RULES = {
  environment: environmentInOnePlace,
  'clock and chance': clockAndChanceInjected,
  'raw SQL': noRawSql,
  'raw HTML': noRawHtml,
  'people tables': peopleTablesAtHome,
  'file size': filesAreSmall,
  'documented paths': documentedPathsExist,
};

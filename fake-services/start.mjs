import { existsSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { startCluster } from './postgres/cluster.mjs';
import { prepareDatabase } from './postgres/template.mjs';
import { createBucket } from './storage/createBucket.mjs';
import { copyPdfWorker, ensureBuild } from './support/build.mjs';
import { createChildren } from './support/children.mjs';
import { ensureDebianPackages } from './support/debian.mjs';
import { ensureDependencies } from './support/dependencies.mjs';
import { pause } from './support/mischief.mjs';
import { openPidFile } from './support/pidFile.mjs';
import { freePort } from './support/ports.mjs';
import { keptSecrets, withoutOwner } from './support/settings.mjs';
import { createRunner } from './support/step.mjs';

/*
 * Loamline with everything it needs, on this machine: `npm start`, or `npm run dev` with --dev.
 * --port and --mail-port: where to begin looking for free ports. --data: the folder to keep everything in.
 * --local: only services of our own, whatever the environment or .env names. --fast-database: no durability (tests). --no-demo: no demo data. --ready-file: written once everything answers.
 */
const root = fileURLToPath(new URL('..', import.meta.url));
const { values: options } = parseArgs({
  options: {
    dev: { type: 'boolean', default: false },
    port: { type: 'string', default: '3000' },
    'mail-port': { type: 'string', default: '3001' },
    data: { type: 'string', default: path.join(root, '.data') },
    local: { type: 'boolean', default: false },
    'fast-database': { type: 'boolean', default: false },
    'no-demo': { type: 'boolean', default: false },
    'ready-file': { type: 'string' },
  },
});
const data = path.resolve(options.data);
const EXTERNAL = [
  'APP_ORIGIN',
  'DATABASE_URL',
  'DATABASE_OWNER_URL',
  'S3_ENDPOINT',
  'RESEND_API_KEY',
  'RESEND_BASE_URL',
  'MAILBOX_URL',
];
const place = (name) => path.join(data, name);
const say = (text) => console.log(text);

const pidFile = openPidFile(place('running.json'));
const children = createChildren({
  logs: place('logs'),
  onChange: pidFile.children,
  onExit: ({ name, code, signal, lastLines }) => {
    const shown = lastLines === '' ? '' : ` Its last words:\n${lastLines}`;
    stop(1, `The ${name} process ended (${signal ?? code}), so everything is stopped.${shown}`);
  },
});
const run = createRunner({ children, root });

let stopping;
function stop(code, reason) {
  stopping ??= (async () => {
    if (reason !== undefined) console.error(`\n${reason}`);
    await children.stopAll();
    pidFile.remove();
    process.exit(code);
  })();
  return stopping;
}

async function waitForWeb(url) {
  for (let waited = 0; waited < 60_000; waited += 100) {
    try {
      const answer = await fetch(url, { redirect: 'manual', signal: AbortSignal.timeout(20_000) });
      await answer.arrayBuffer();
      return;
    } catch {
      await pause(100);
    }
  }
  throw new Error(`The web process does not answer at ${url}.`);
}

async function waitForHealth(url) {
  for (let waited = 0; ; waited += 25) {
    const answer = await fetch(`${url}/_health`).catch(() => undefined);
    if (answer?.ok) return;
    if (waited > 15_000) throw new Error(`${url} does not answer.`);
    await pause(25);
  }
}

const childEnv = (env) => ({ ...process.env, ...env });

async function startDatabase(env) {
  if (process.env.DATABASE_URL) return undefined;
  const marker = place('demo-in-making');
  const cluster = await startCluster({
    folder: place('postgres'),
    database: 'loamline',
    port: options['fast-database'] ? 0 : 5433,
    fast: options['fast-database'],
    children,
    say,
  });
  // A demo that was cut off in the making is thrown away: nobody but this script has written to it yet.
  if (existsSync(marker)) {
    cluster.sql('drop database if exists loamline with (force)', 'postgres');
    cluster.createDatabase('loamline');
    rmSync(marker);
  }
  env.DATABASE_URL = cluster.url('loamline_app');
  env.DATABASE_OWNER_URL = cluster.url('loamline_owner');
  return cluster;
}

async function startStore(env, secrets, taken) {
  if (process.env.S3_ENDPOINT) return;
  const port = await freePort(options['mail-port'] === '0' ? 0 : 3002, taken);
  taken.push(port);
  Object.assign(env, {
    S3_ENDPOINT: `http://127.0.0.1:${port}`,
    S3_BUCKET: 'loamline',
    S3_REGION: 'eu-central-1',
    S3_ACCESS_KEY_ID: 'LOAMLINELOCAL',
    S3_SECRET_ACCESS_KEY: secrets.S3_SECRET_ACCESS_KEY,
  });
  const own = { STORAGE_FOLDER: place('storage'), STORAGE_PORT: String(port) };
  children.start('store', process.execPath, ['fake-services/storage/main.mjs'], {
    cwd: root,
    env: childEnv({ ...env, ...own }),
  });
  await waitForHealth(env.S3_ENDPOINT);
  await createBucket(env);
}

async function startMailbox(env, secrets, taken) {
  if (process.env.RESEND_API_KEY || process.env.RESEND_BASE_URL) return;
  const port = await freePort(Number(options['mail-port']), taken);
  taken.push(port);
  const url = `http://127.0.0.1:${port}`;
  Object.assign(env, { RESEND_API_KEY: secrets.RESEND_API_KEY, RESEND_BASE_URL: url, MAILBOX_URL: url });
  const own = { MAIL_FOLDER: place('mail'), MAIL_PORT: String(port) };
  children.start('mailbox', process.execPath, ['fake-services/mail/main.mjs'], {
    cwd: root,
    env: childEnv({ ...env, ...own }),
  });
  await waitForHealth(url);
}

async function prepareData(env, cluster) {
  const ownerUrl = env.DATABASE_OWNER_URL ?? process.env.DATABASE_OWNER_URL;
  if (!ownerUrl) return say('DATABASE_OWNER_URL is not set: the tables of the given database are taken as they are.');
  await prepareDatabase({ run, ownerUrl, env: childEnv(env) });
  const wanted = cluster !== undefined && !options['no-demo'] && existsSync(path.join(root, 'db/seed.ts'));
  if (!wanted || cluster.sql('select exists (select from person)') === 't') return undefined;
  say('Making the demo …');
  writeFileSync(place('demo-in-making'), '');
  const accounts = place('demo-accounts.json');
  await run('demo', process.execPath, ['--import', 'tsx', 'db/seed.ts', accounts], { env: childEnv(env) });
  rmSync(place('demo-in-making'));
  return undefined;
}

function signIns(cluster) {
  const file = place('demo-accounts.json');
  if (cluster === undefined || !existsSync(file)) return [];
  const accounts = JSON.parse(readFileSync(file, 'utf8'));
  return accounts.map(({ role, email, password }) => `  ${role.padEnd(9)}${email.padEnd(32)}${password}`);
}

async function main() {
  const { major, minor } = /^v(?<major>\d+)\.(?<minor>\d+)/.exec(process.version).groups;
  if (Number(major) < 20 || (Number(major) === 20 && Number(minor) < 15)) {
    throw new Error(`Loamline needs Node.js 20.15 or newer; this is ${process.version}.`);
  }
  await pidFile.recover(say);
  pidFile.claim();
  if (options.local) for (const name of EXTERNAL) delete process.env[name];
  else if (existsSync(path.join(root, '.env'))) process.loadEnvFile(path.join(root, '.env'));
  if (!process.env.DATABASE_URL) ensureDebianPackages(['postgresql'], say);
  await ensureDependencies({ root, run, say });
  if (options.dev) copyPdfWorker(root);
  else await ensureBuild({ root, run, say });

  const secrets = keptSecrets(data);
  const taken = [];
  const webPort = await freePort(Number(options.port), taken);
  taken.push(webPort);
  const origin = `http://127.0.0.1:${webPort}`;
  const env = {
    NEXT_TELEMETRY_DISABLED: '1',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    NODE_ENV: options.dev ? 'development' : 'production',
    APP_ORIGIN: process.env.APP_ORIGIN || origin,
    APP_SECRET: process.env.APP_SECRET || secrets.APP_SECRET,
    MAIL_FROM: process.env.MAIL_FROM || 'Loamline <post@mail.loamline.test>',
    LOAMLINE_GALLERY: process.env.LOAMLINE_GALLERY || (options.dev ? '1' : '0'),
  };
  await startMailbox(env, secrets, taken);
  await startStore(env, secrets, taken);
  const cluster = await startDatabase(env);
  await prepareData(env, cluster);

  const running = withoutOwner(childEnv(env));
  const worker = options.dev
    ? ['--import', 'tsx', 'lib/jobs/worker.ts']
    : ['--enable-source-maps', '.next/worker/worker.mjs'];
  children.start('worker', process.execPath, worker, { cwd: root, env: running, show: options.dev });
  const next = [
    'node_modules/next/dist/bin/next',
    options.dev ? 'dev' : 'start',
    '-H',
    '127.0.0.1',
    '-p',
    String(webPort),
  ];
  children.start('web', process.execPath, next, { cwd: root, env: running, show: options.dev });
  await waitForWeb(origin);
  if (stopping) return;
  pidFile.address(origin);

  const accounts = signIns(cluster);
  say(
    [
      '',
      `Loamline   ${env.APP_ORIGIN}${env.APP_ORIGIN === origin ? '' : `  (here: ${origin})`}`,
      ...(env.MAILBOX_URL ? [`Mailbox    ${env.MAILBOX_URL}  (every mail it sends stays there)`] : []),
      ...(accounts.length > 0 ? ['', 'Sign in to the demo as:', ...accounts] : []),
      '',
      `Data and logs are in ${path.relative(root, data) || data}. Ctrl-C stops everything.`,
    ].join('\n'),
  );
  if (options['ready-file'] !== undefined) {
    const owner =
      cluster === undefined ? {} : { DATABASE_SUPERUSER_URL: cluster.url('postgres'), DATABASE_FOLDER: cluster.home };
    const making = `${options['ready-file']}.making`;
    writeFileSync(making, JSON.stringify({ ...env, ...owner }), { mode: 0o600 });
    renameSync(making, options['ready-file']);
  }
}

process.on('SIGINT', () => stop(0));
process.on('SIGTERM', () => stop(0));
process.on('SIGHUP', () => stop(0));
main().catch((error) => (stopping === undefined ? stop(1, error.message) : undefined));

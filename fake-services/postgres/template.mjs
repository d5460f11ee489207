import { spawnSync } from 'node:child_process';

export const TEMPLATE = 'loamline_template';

/** Runs the project's own migration and queue steps as the owner; both are TypeScript, so through tsx. */
export function prepareDatabase({ root, ownerUrl, env = process.env }) {
  for (const step of ['db/migrate.ts', 'lib/jobs/commands/prepareQueue.ts']) {
    const result = spawnSync(process.execPath, ['--import', 'tsx', step], {
      cwd: root,
      env: { ...env, DATABASE_OWNER_URL: ownerUrl },
      encoding: 'utf8',
    });
    if (result.status !== 0) throw new Error(`${step} failed:\n${result.stdout}${result.stderr}`);
  }
}

/** The database every test database is a copy of; nobody may stay connected to it. */
export function prepareTemplate({ cluster, root, env }) {
  cluster.createDatabase(TEMPLATE);
  prepareDatabase({ root, ownerUrl: cluster.url('loamline_owner', TEMPLATE), env });
}

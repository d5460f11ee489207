export const TEMPLATE = 'loamline_template';

/** Runs the project's own migration and queue steps as the owner; both are TypeScript, so through tsx. */
export async function prepareDatabase({ run, ownerUrl, env }) {
  const asOwner = { env: { ...env, DATABASE_OWNER_URL: ownerUrl } };
  await run('migrate', process.execPath, ['--import', 'tsx', 'db/migrate.ts'], asOwner);
  await run('queue', process.execPath, ['--import', 'tsx', 'lib/jobs/commands/prepareQueue.ts'], asOwner);
}

/** The database every test database is a copy of; nobody may stay connected to it. */
export async function prepareTemplate({ cluster, run, env }) {
  cluster.createDatabase(TEMPLATE);
  await prepareDatabase({ run, ownerUrl: cluster.url('loamline_owner', TEMPLATE), env });
}

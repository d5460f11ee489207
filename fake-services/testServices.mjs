import { randomBytes } from 'node:crypto';
import { chmodSync, mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import path from 'node:path';
import { startMail } from './mail/server.mjs';
import { startCluster } from './postgres/cluster.mjs';
import { prepareTemplate, TEMPLATE } from './postgres/template.mjs';
import { createBucket } from './storage/createBucket.mjs';
import { startStorage } from './storage/server.mjs';
import { createChildren } from './support/children.mjs';
import { createRunner } from './support/step.mjs';

/**
 * A cluster without durability, a store and a mailbox of the tests' own, on free ports, with everything in a folder that
 * `stop` removes. `env` is what the program and the tests read; DATABASE_URL is left to the test that makes a database.
 */
export async function startTestServices({ root }) {
  const out = path.join(root, 'tests', '.out');
  mkdirSync(out, { recursive: true });
  const folder = mkdtempSync(path.join(out, 'services-'));
  // The user postgres must be able to enter.
  chmodSync(folder, 0o755);
  const secret = () => randomBytes(24).toString('hex');
  const access = { accessKeyId: 'TESTSTORE', secretAccessKey: secret(), region: 'eu-central-1' };
  const apiKey = `re_${secret()}`;
  const storage = await startStorage({ folder: path.join(folder, 'storage'), port: 0, ...access });
  const mail = await startMail({ folder: path.join(folder, 'mail'), port: 0, apiKey });
  const children = createChildren({ logs: path.join(folder, 'logs') });
  let cluster;
  const stop = async () => {
    await Promise.all([storage.close(), mail.close(), children.stopAll()]);
    rmSync(folder, { recursive: true, force: true });
    if (cluster !== undefined) rmSync(cluster.home, { recursive: true, force: true });
  };
  try {
    cluster = await startCluster({
      folder: path.join(folder, 'postgres'),
      database: 'loamline_unused',
      fast: true,
      children,
    });
    const env = {
      TEST_CLUSTER_URL: cluster.url('postgres', 'postgres'),
      TEST_OWNER_URL: cluster.url('loamline_owner', TEMPLATE),
      TEST_APP_URL: cluster.url('loamline_app', TEMPLATE),
      TEST_BACKUP_URL: cluster.url('loamline_backup', TEMPLATE),
      DATABASE_URL: cluster.url('loamline_app', 'loamline_unused'),
      S3_ENDPOINT: storage.url,
      S3_BUCKET: 'loamline',
      S3_REGION: access.region,
      S3_ACCESS_KEY_ID: access.accessKeyId,
      S3_SECRET_ACCESS_KEY: access.secretAccessKey,
      RESEND_API_KEY: apiKey,
      RESEND_BASE_URL: mail.url,
      MAIL_FROM: 'Loamline <post@mail.loamline.test>',
      MAILBOX_URL: mail.url,
      APP_ORIGIN: 'http://127.0.0.1:3000',
      APP_SECRET: secret(),
      LOAMLINE_GALLERY: '1',
      NEXT_TELEMETRY_DISABLED: '1',
      AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    };
    await createBucket(env);
    await prepareTemplate({ cluster, run: createRunner({ children, root }), env: { ...process.env, ...env } });
    return { env, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}

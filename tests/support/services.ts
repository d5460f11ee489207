import { readFile } from 'node:fs/promises';
import type { TestProject } from 'vitest/node';
import { startTestServices } from '../../fake-services/testServices.mjs';

const NEEDS_SERVICES =
  /support\/(database|\w*[fF]actory|stack)|createTestDatabase|TEST_CLUSTER_URL|S3_ENDPOINT|RESEND_BASE_URL/;

/**
 * `npm test` brings cluster, store and mailbox in the environment. When vitest is run by itself on some files, they are
 * started here, and only when one of those files asks for them.
 */
export default async function setup(project: TestProject): Promise<(() => Promise<void>) | undefined> {
  if (process.env.TEST_CLUSTER_URL !== undefined) return undefined;
  // Vitest keeps the files named on its command line here without typing them; without any, all files count.
  const named: unknown = Reflect.get(project.vitest, 'filenamePattern');
  const { testFiles } = await project.globTestFiles(Array.isArray(named) ? named.map(String) : undefined);
  const texts = await Promise.all(testFiles.map((file) => readFile(file, 'utf8')));
  if (!texts.some((text) => NEEDS_SERVICES.test(text))) return undefined;
  const services = await startTestServices({ root: project.config.root });
  Object.assign(process.env, services.env);
  return services.stop;
}

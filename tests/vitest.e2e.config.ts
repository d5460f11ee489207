import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('..', import.meta.url));

// One browser at a time against one started stack; a flaky test is a bug, so nothing is tried twice.
export default defineConfig({
  root,
  resolve: { alias: { '@': root.replace(/\/$/, '') } },
  test: {
    include: ['tests/e2e/**/*.e2e.ts'],
    testTimeout: 180_000,
    hookTimeout: 60_000,
    retry: 0,
    fileParallelism: false,
    maxWorkers: 1,
  },
});

import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('..', import.meta.url));

export default defineConfig({
  root,
  resolve: { alias: { '@': root.replace(/\/$/, '') } },
  test: {
    include: [
      'lib/**/*.test.{ts,tsx}',
      'app/**/*.test.{ts,tsx}',
      'db/**/*.test.ts',
      'tests/**/*.test.{ts,tsx}',
      'fake-services/**/*.test.{ts,mjs}',
    ],
    exclude: ['tests/e2e/**', 'node_modules/**'],
    setupFiles: ['tests/support/strictConsole.ts'],
    globalSetup: ['tests/support/services.ts'],
    testTimeout: 30_000,
    hookTimeout: 60_000,
  },
});

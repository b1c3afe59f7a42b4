import { svelte } from '@sveltejs/vite-plugin-svelte';
import { resolve } from 'node:path';
import { defineConfig } from 'vitest/config';

const root = resolve(import.meta.dirname, '..');
const shared = { root, setupFiles: ['.config/vitest.setup.ts'] };
const built = ['tests/window/**/*.test.ts', 'tests/cli/**/*.test.ts'];

/**
 * Two projects: `unit` needs the sources only; `built` runs the built command line and the built window in Chromium
 * (`npm run build` first).
 */
export default defineConfig({
  root,
  test: {
    reporters: ['default', resolve(import.meta.dirname, 'count-reporter.ts')],
    allowOnly: false,
    coverage: {
      provider: 'v8',
      include: ['sim/**/*.ts', 'main/**/*.ts', 'renderer/**/*.ts'],
      exclude: ['tests/**', '.config/**'],
      reportsDirectory: 'coverage',
    },
    projects: [
      {
        plugins: [svelte({ configFile: false })],
        test: { ...shared, name: 'unit', include: ['tests/**/*.test.ts'], exclude: built, testTimeout: 60_000 },
      },
      { test: { ...shared, name: 'built', include: built, testTimeout: 60_000, hookTimeout: 60_000 } },
    ],
  },
});

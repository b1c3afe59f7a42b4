import { svelte } from '@sveltejs/vite-plugin-svelte';
import { resolve } from 'node:path';
import { defineConfig } from 'vite';

const root = resolve(import.meta.dirname, '..');

/** The window: built for Electron's Chromium, opened from a file or from loopback, so every address is relative. */
export default defineConfig({
  root: resolve(root, 'renderer'),
  base: './',
  publicDir: false,
  plugins: [svelte({ configFile: false })],
  worker: { format: 'es' },
  build: {
    outDir: resolve(root, 'dist/renderer'),
    emptyOutDir: true,
    target: 'chrome150',
    sourcemap: true,
    chunkSizeWarningLimit: 2000,
    rolldownOptions: { checks: { bundlerTimings: false } },
  },
});

import { readFileSync } from 'node:fs';
import react from '@vitejs/plugin-react';
import type { Plugin } from 'vite';
import { defineConfig } from 'vitest/config';
import { chromiumPath } from './tests/browser/chromium.ts';

const { version } = JSON.parse(readFileSync('package.json', 'utf8')) as { version: string };

/** Nothing from elsewhere, nothing inline; in development vite itself needs inline styles. */
const contentPolicy: Plugin = {
  name: 'content-policy',
  apply: 'build',
  transformIndexHtml: () => [
    {
      tag: 'meta',
      injectTo: 'head-prepend',
      attrs: {
        'http-equiv': 'Content-Security-Policy',
        content:
          "default-src 'none'; script-src 'self'; style-src 'self'; worker-src 'self'; connect-src 'self'; img-src 'self' data: blob:; font-src 'self'; base-uri 'none'; form-action 'none'",
      },
    },
  ],
};

export default defineConfig(async () => {
  if (process.env.VITEST) process.env.CHROMIUM_PATH = await chromiumPath();
  return {
    root: 'app',
    base: './',
    publicDir: '../public',
    plugins: [react(), contentPolicy],
    define: { __SIMMERLINE_VERSION__: JSON.stringify(version) },
    build: { target: 'es2022', outDir: '../dist', emptyOutDir: true },
    worker: { format: 'es' as const },
    test: {
      root: '.',
      projects: [
        {
          extends: true as const,
          test: {
            name: 'unit',
            include: ['tests/**/*.test.ts'],
            environment: 'node' as const,
            testTimeout: 60_000,
          },
        },
        {
          extends: true as const,
          test: {
            name: 'e2e',
            include: ['tests/**/*.e2e.ts'],
            environment: 'node' as const,
            fileParallelism: false,
            testTimeout: 60_000,
            hookTimeout: 60_000,
          },
        },
        {
          extends: true as const,
          test: {
            name: 'soak',
            include: ['tests/**/*.soak.ts'],
            environment: 'node' as const,
            testTimeout: 3_600_000,
          },
        },
      ],
    },
  };
});

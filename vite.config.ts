import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';
import { chromiumPath } from './tests/browser/chromium.ts';

export default defineConfig(async () => {
  if (process.env.VITEST) process.env.CHROMIUM_PATH = await chromiumPath();
  return {
    root: 'app',
    base: './',
    publicDir: '../public',
    plugins: [react()],
    build: { target: 'es2022', outDir: '../dist', emptyOutDir: true },
    worker: { format: 'es' as const },
    test: {
      root: '.',
      projects: [
        {
          extends: true as const,
          test: { name: 'unit', include: ['tests/**/*.test.ts'], environment: 'node' as const },
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

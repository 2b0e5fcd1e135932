import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const node = (name: string, include: string[], extra: object = {}) => ({
  extends: true as const,
  test: { name, include, environment: 'node' as const, ...extra },
});

export default defineConfig({
  plugins: [react(), tailwindcss()],
  server: { watch: { ignored: ['**/.data/**', '**/dist/**'] } },
  build: { target: 'es2022', sourcemap: false, manifest: true },
  test: {
    maxWorkers: 2,
    projects: [
      node('unit', ['src/**/*.test.ts', 'server/**/*.test.ts', 'tests/reference/**/*.test.ts']),
      { extends: true, test: { name: 'screen', include: ['src/**/*.test.tsx'], environment: 'happy-dom' } },
      node('architecture', ['tests/architecture/**/*.test.ts'], { testTimeout: 180_000 }),
      node('server', ['tests/{api,realtime,jobs,migrations,faults}/**/*.test.ts'], {
        globalSetup: ['tests/support/global-setup.ts'],
        testTimeout: 60_000,
        hookTimeout: 60_000,
      }),
      node('e2e', ['tests/e2e/**/*.test.ts'], {
        globalSetup: ['tests/support/global-setup.ts'],
        testTimeout: 180_000,
        hookTimeout: 180_000,
        sequence: { groupOrder: 1 },
      }),
    ],
  },
});

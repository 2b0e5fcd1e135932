import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';
import { BaseSequencer, type TestSpecification } from 'vitest/node';

const node = (name: string, include: string[], extra: object = {}) => ({
  extends: true as const,
  test: { name, include, environment: 'node' as const, ...extra },
});

/** Files that take longest begin first, so that no core waits at the end for one of them. */
const LONGEST = ['architecture/rules', 'domain/house/order', 'api/order', 'api/bad-input', 'api/rights', 'e2e/pages', 'e2e/floor-layout', 'e2e/floor-desk'];
class LongestFirst extends BaseSequencer {
  override async sort(files: TestSpecification[]): Promise<TestSpecification[]> {
    const isLong = ({ moduleId }: TestSpecification) => LONGEST.some((name) => moduleId.includes(`/${name}.test.`));
    const [long, others] = [files.filter(isLong), files.filter((file) => !isLong(file))];
    return [...long, ...(await super.sort(others))];
  }
}

export default defineConfig({
  plugins: [react(), tailwindcss()],
  server: { watch: { ignored: ['**/.data/**', '**/dist/**'] } },
  build: { target: 'es2022', sourcemap: false, manifest: true },
  test: {
    maxWorkers: 2,
    // What a test needs it makes itself: modules hold no state, so files of one worker may share them.
    isolate: false,
    sequence: { sequencer: LongestFirst },
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

// Builds (command line, benchmark, the page) and the test runner. The output goes to dist/.
import { existsSync } from 'node:fs';
import { resolve } from 'node:path';
import { defineConfig, type ViteUserConfig } from 'vitest/config';
import type { Reporter, TestModule } from 'vitest/node';

const root = import.meta.dirname;

/** Entries of each build, by the name given to `vite build --mode`. */
const builds: Record<string, Record<string, string>> = {
  cli: { main: 'sim/cli/main.ts', worker: 'sim/cli/worker.ts' },
  bench: { main: 'tests/bench/main.ts' },
};

/** Ends a test run with one plain line. A file that does not load and an error outside a test count as failed. */
const closingLine: Reporter = {
  onTestRunEnd(modules: readonly TestModule[], unhandledErrors: readonly unknown[]) {
    let passed = 0;
    let failed = unhandledErrors.length;
    for (const module of modules) {
      const results = [...module.children.allTests()].map((test) => test.result().state);
      passed += results.filter((state) => state === 'passed').length;
      const failedTests = results.filter((state) => state === 'failed').length;
      failed += failedTests === 0 && module.state() === 'failed' ? 1 : failedTests;
    }
    console.log(`${passed} passed, ${failed} failed`);
  },
};

/** The page: its own root, chunks by use, and no module of the simulator kept for its side effects (it has none). */
const page: ViteUserConfig = {
  root: resolve(root, 'ui'),
  base: './',
  server: { fs: { allow: [root] } },
  worker: { format: 'es' },
  build: {
    target: 'es2022',
    outDir: resolve(root, 'dist/ui'),
    emptyOutDir: true,
    modulePreload: { polyfill: false },
    // One chunk is plotly; its size is known.
    chunkSizeWarningLimit: 6000,
    rolldownOptions: { treeshake: { moduleSideEffects: (id: string) => !id.includes('/sim/') } },
  },
};

const node = (mode: string): ViteUserConfig => ({
  root,
  build: {
    ssr: true,
    target: 'node20',
    outDir: `dist/${mode}`,
    emptyOutDir: true,
    rolldownOptions: {
      // The worker thread is a second entry; a build without one is the command line in a single thread.
      input: Object.fromEntries(Object.entries(builds[mode] ?? {}).filter(([, file]) => existsSync(file))),
      output: { entryFileNames: '[name].js', chunkFileNames: '[name]-[hash].js' },
    },
  },
  // One bundle starts faster than a tree of modules; tests load packages as Node does.
  ssr: { noExternal: mode === 'test' ? [] : true },
  test: {
    include: ['tests/**/*.test.ts'],
    // Guards against a hang, not a measure of speed: machines are shared.
    testTimeout: 60_000,
    hookTimeout: 120_000,
    reporters: ['default', closingLine],
    coverage: { include: ['sim/**/*.ts', 'ui/**/*.ts'], reportsDirectory: 'coverage' },
  },
});

export default defineConfig(({ mode }) => (mode === 'ui' ? page : node(mode)));

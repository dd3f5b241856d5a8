import { defineConfig, mergeConfig } from 'vitest/config'
import viteConfig from './vite.config.ts'

/** The layers of the suite; `vitest run --project unit` runs one of them. */
export default mergeConfig(
  viteConfig,
  defineConfig({
    test: {
      reporters: ['default', './tests/support/closing-line-reporter.ts'],
      // By default one processor would stay idle: of two, half.
      maxWorkers: '100%',
      projects: [
        {
          extends: true,
          test: {
            name: 'unit',
            include: ['tests/unit/{shared,server}/**/*.test.ts'],
            environment: 'node',
          },
        },
        {
          extends: true,
          test: { name: 'reference', include: ['tests/reference/**/*.test.ts'], environment: 'node' },
        },
        {
          extends: true,
          test: {
            name: 'component',
            include: ['tests/unit/src/**/*.test.ts', 'tests/component/**/*.test.ts'],
            environment: 'happy-dom',
            setupFiles: ['tests/support/component-setup.ts'],
            server: { deps: { inline: ['vuetify'] } },
            testTimeout: 20_000,
          },
        },
        {
          extends: true,
          test: {
            name: 'api',
            include: ['tests/api/**/*.test.ts'],
            environment: 'node',
            globalSetup: ['tests/support/postgres-setup.ts'],
            testTimeout: 20_000,
            hookTimeout: 60_000,
          },
        },
        {
          extends: true,
          test: {
            name: 'e2e',
            include: ['tests/e2e/**/*.test.ts'],
            environment: 'node',
            globalSetup: ['tests/support/postgres-setup.ts', 'tests/support/e2e-setup.ts'],
            testTimeout: 120_000,
            hookTimeout: 120_000,
            fileParallelism: false,
            sequence: { groupOrder: 1 },
          },
        },
      ],
    },
  }),
)

import { defineConfig, mergeConfig } from 'vitest/config'
import viteConfig from './vite.config.ts'

/**
 * `npm run bench`: prints milliseconds and ratios; judged by people, never part of the suite. Modules are loaded by Node itself
 * as the server loads them: the test runner's own module loader puts a lookup before every call of an imported function, which
 * nearly doubles the time of inner loops.
 */
export default mergeConfig(
  viteConfig,
  defineConfig({
    test: {
      include: ['tests/bench/**/*.bench.ts'],
      environment: 'node',
      fileParallelism: false,
      testTimeout: 300_000,
      pool: 'forks',
      execArgv: ['--import', 'tsx'],
      experimental: { viteModuleRunner: false, nodeLoader: false },
    },
  }),
)

import { defineConfig, mergeConfig } from 'vitest/config'
import viteConfig from './vite.config.ts'

/** `npm run bench`: prints milliseconds and ratios; judged by people, never part of the suite. */
export default mergeConfig(
  viteConfig,
  defineConfig({
    test: {
      include: ['tests/bench/**/*.bench.ts'],
      environment: 'node',
      fileParallelism: false,
      testTimeout: 300_000,
    },
  }),
)

import { defineConfig } from 'vite'

/** The server, bundled for Node; packages stay external, so they belong in "dependencies". */
export default defineConfig({
  build: {
    ssr: true,
    outDir: 'dist/server',
    emptyOutDir: true,
    target: 'node20',
    sourcemap: true,
    minify: false,
    copyPublicDir: false,
    rolldownOptions: { input: { index: 'server/index.ts', worker: 'server/worker.ts' } },
  },
})

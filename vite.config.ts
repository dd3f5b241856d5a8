import { fileURLToPath, URL } from 'node:url'
import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vite'
import vuetify, { transformAssetUrls } from 'vite-plugin-vuetify'

const folder = (path: string): string => fileURLToPath(new URL(path, import.meta.url))

/** The browser application: built to dist/client, served by the server; in development proxied to it. */
export default defineConfig({
  plugins: [vue({ template: { transformAssetUrls } }), vuetify({ autoImport: true })],
  resolve: { alias: { '@': folder('./src'), '@shared': folder('./shared') } },
  worker: { format: 'es' },
  build: { outDir: 'dist/client', emptyOutDir: true, target: 'es2022', assetsInlineLimit: 0 },
  server: {
    host: '127.0.0.1',
    proxy: { '/api': `http://127.0.0.1:${process.env.BEADWRIGHT_API_PORT ?? '4310'}` },
  },
})

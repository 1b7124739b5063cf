/// <reference types="vitest/config" />
import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { type Plugin, defineConfig } from 'vite'
import { injectManifest } from 'workbox-build'

const onDatabase = { globalSetup: ['tests/support/global-setup.ts'], testTimeout: 30_000, hookTimeout: 60_000 }

const outDir = 'dist/client'

/** Lists the built files in the service worker, so that the shell opens without a signal. */
function offlineShell(): Plugin {
  return {
    name: 'offline-shell',
    apply: 'build',
    async writeBundle() {
      const worker = `${outDir}/service-worker.js`
      await injectManifest({
        swSrc: worker,
        swDest: worker,
        globDirectory: outDir,
        globPatterns: ['index.html', 'manifest.webmanifest', '*.svg', 'assets/**/*.{js,css,woff2}'],
        dontCacheBustURLsMatching: /^assets\//,
      })
    },
  }
}

export default defineConfig({
  plugins: [react(), tailwindcss(), offlineShell()],
  build: {
    outDir,
    assetsInlineLimit: 0,
    target: 'es2023',
    chunkSizeWarningLimit: 700,
    rolldownOptions: {
      input: { index: 'index.html', 'service-worker': 'src/service-worker.ts' },
      output: { entryFileNames: (chunk) => (chunk.name === 'service-worker' ? 'service-worker.js' : 'assets/[name]-[hash].js') },
    },
  },
  test: {
    // One project a tree; two of them need a database. A file that wants jsdom says so at its top.
    projects: [
      { test: { name: 'architecture', include: ['tests/architecture/**/*.test.ts'], testTimeout: 60_000 } },
      { test: { name: 'shared', include: ['tests/shared/**/*.test.ts'], testTimeout: 20_000 } },
      { test: { name: 'src', include: ['tests/src/**/*.test.{ts,tsx}'], testTimeout: 20_000 } },
      { test: { name: 'server', include: ['tests/server/**/*.test.ts'], ...onDatabase } },
      { test: { name: 'realtime', include: ['tests/realtime/**/*.test.ts'], ...onDatabase } },
    ],
  },
})

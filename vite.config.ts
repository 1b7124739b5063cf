/// <reference types="vitest/config" />
import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { type Plugin, build, defineConfig } from 'vite'
import { injectManifest } from 'workbox-build'

const onDatabase = { globalSetup: ['tests/support/global-setup.ts'], testTimeout: 30_000, hookTimeout: 60_000 }

const outDir = 'dist/client'

/**
 * The service worker, built by itself into one file (a worker of the plain kind cannot import), with the list of the
 * built files in it, so that the shell opens without a signal.
 */
function offlineShell(): Plugin {
  return {
    name: 'offline-shell',
    apply: 'build',
    async writeBundle({ dir = outDir }) {
      const worker = `${dir}/service-worker.js`
      await build({
        configFile: false,
        publicDir: false,
        logLevel: 'warn',
        build: {
          outDir: dir,
          emptyOutDir: false,
          target: 'es2023',
          rolldownOptions: {
            input: 'src/service-worker.ts',
            output: { format: 'iife', entryFileNames: 'service-worker.js' },
          },
        },
      })
      await injectManifest({
        swSrc: worker,
        swDest: worker,
        globDirectory: dir,
        globPatterns: ['index.html', 'manifest.webmanifest', '*.svg', 'assets/**/*.{js,css,woff2}'],
        globIgnores: ['**/*-{cyrillic,vietnamese}-*'],
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
      output: {
        // What changes seldom, in files of their own: a new build leaves them in the browser's cache.
        codeSplitting: {
          groups: [
            {
              name: 'react',
              test: /node_modules[\\/](react|react-dom|scheduler|react-router|react-router-dom|@tanstack)[\\/]/,
            },
            { name: 'zod', test: /node_modules[\\/]zod[\\/]/ },
            {
              name: 'yjs',
              test: /node_modules[\\/](yjs|lib0|y-protocols|y-websocket|fractional-indexing|idb)[\\/]/,
            },
          ],
        },
      },
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

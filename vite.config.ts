/// <reference types="vitest/config" />
import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vite'

const onDatabase = { globalSetup: ['tests/support/global-setup.ts'], testTimeout: 30_000, hookTimeout: 60_000 }

export default defineConfig({
  plugins: [react(), tailwindcss()],
  build: { outDir: 'dist/client', assetsInlineLimit: 0, target: 'es2023', chunkSizeWarningLimit: 700 },
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

import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vitest/config'

/** One tooling file: the web build, and the four kinds of test that vitest runs. */
export default defineConfig({
  plugins: [react(), tailwindcss()],
  // Nothing inlined as data: the content policy takes files of our own only.
  build: {
    outDir: '.data/web',
    emptyOutDir: true,
    sourcemap: false,
    // Which files each page is made of: the service worker keeps those of the phone's pages by it.
    manifest: 'files.json',
    assetsInlineLimit: 0,
    // The service worker keeps its name and place: its scope is the folder it stands in.
    rollupOptions: {
      input: { index: 'index.html', sw: 'web/sw.ts' },
      output: { entryFileNames: (chunk) => (chunk.name === 'sw' ? 'sw.js' : 'assets/[name]-[hash].js') },
    },
  },
  server: { watch: { ignored: ['**/.data/**'] } },
  test: {
    // The S3 SDK warns once that it will leave this Node version behind; the tests let nothing be printed.
    env: { AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true' },
    projects: [
      {
        test: {
          name: 'unit',
          include: [
            'shared/**/*.test.ts',
            'server/**/*.test.ts',
            'worker/**/*.test.ts',
            'web/lib/**/*.test.ts',
            'tests/unit/**/*.test.ts',
          ],
          setupFiles: ['tests/support/fail-on-console.ts'],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'web',
          environment: 'jsdom',
          include: ['tests/web/**/*.test.tsx'],
          setupFiles: ['tests/support/fail-on-console.ts'],
          testTimeout: 30_000,
        },
      },
      {
        test: {
          name: 'service',
          include: ['tests/server/**/*.test.ts', 'tests/worker/**/*.test.ts'],
          globalSetup: ['tests/support/database-setup.ts'],
          setupFiles: ['tests/support/fail-on-console.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'browser',
          include: ['tests/e2e/**/*.test.ts'],
          globalSetup: ['tests/support/database-setup.ts'],
          fileParallelism: false,
          testTimeout: 300_000,
          hookTimeout: 180_000,
        },
      },
    ],
  },
})

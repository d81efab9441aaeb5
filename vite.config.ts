import { fileURLToPath, URL } from 'node:url'
import vue from '@vitejs/plugin-vue'
import type { UserConfig } from 'vite'
import { defineConfig } from 'vitest/config'
import { chunkGroups } from './scripts/lib/vite-chunks.ts'
import { nameEarlyChunks, packFiles, slimZod } from './scripts/lib/vite-plugins.ts'

const local = (path: string) => fileURLToPath(new URL(path, import.meta.url))
const view = (name: string) => local(`src/views/${name}View.vue`)
const alias = { '@': local('src') }

const FIRST_SCREEN = [local('src/main.ts'), view('Board')]
const FIELD_PAGES = ['Item', 'Kit', 'Test', 'RecordTest', 'RecordKitTest', 'Find', 'Tag', 'DueChecks']

const isFieldPage = (file: string) => ['Board', ...FIELD_PAGES].some((name) => file.includes(`/${name}View-`))

const client: UserConfig = {
  publicDir: 'src/public',
  plugins: [vue(), slimZod(), nameEarlyChunks('src/views/BoardView.vue', 'board-chunks'), packFiles()],
  build: {
    outDir: 'dist',
    target: 'es2022',
    assetsInlineLimit: 0,
    manifest: true,
    modulePreload: {
      polyfill: false,
      // The entry lists what each page preloads by name. Those at a desk do with styles: their scripts follow by themselves.
      resolveDependencies: (file, dependencies) =>
        isFieldPage(file) ? dependencies : dependencies.filter((name) => name.endsWith('.css')),
    },
    rolldownOptions: {
      treeshake: { propertyReadSideEffects: false, unknownGlobalSideEffects: false },
      output: {
        codeSplitting: {
          groups: chunkGroups({ first: FIRST_SCREEN, door: [view('SignIn')], field: FIELD_PAGES.map(view) }),
        },
      },
    },
  },
}

/**
 * One file with its libraries in it, which a start reads in less than half the time that its sources take. Not made
 * small, so that the places named in a log can be read; source maps would cost each start a second.
 */
const server: UserConfig = {
  publicDir: false,
  build: { target: 'node20', minify: false },
  // These load machine code or files of their own, from where they are installed.
  ssr: { noExternal: true, external: ['argon2', 'pdfkit', 'pg-native', 'sharp'] },
}

export default defineConfig(({ isSsrBuild }) => ({
  ...(isSsrBuild ? server : client),
  resolve: { alias },
  server: { proxy: { '/api': 'http://127.0.0.1:8080' } },
  test: {
    // Modules are read once for each worker, not once for each file: more than half of the time went there. No module
    // of ours keeps state; what a test changes it puts back.
    isolate: false,
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['tests/shared/**/*.test.ts', 'tests/src/**/*.test.ts', 'tests/scripts/**/*.test.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'api',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts'],
          testTimeout: 20_000,
          hookTimeout: 60_000,
          maxWorkers: 2,
        },
      },
    ],
  },
}))

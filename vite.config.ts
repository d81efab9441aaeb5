import { fileURLToPath, URL } from 'node:url'
import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vitest/config'
import { nameEarlyChunks, withoutJsonSchema } from './scripts/lib/vite-plugins.ts'

const alias = { '@': fileURLToPath(new URL('./src', import.meta.url)) }

export default defineConfig({
  publicDir: 'src/public',
  plugins: [vue(), withoutJsonSchema(), nameEarlyChunks('src/views/BoardView.vue', 'board-chunks')],
  resolve: { alias },
  build: {
    outDir: 'dist',
    target: 'es2022',
    assetsInlineLimit: 0,
    manifest: true,
    modulePreload: { polyfill: false },
    rolldownOptions: {
      treeshake: { propertyReadSideEffects: false, unknownGlobalSideEffects: false },
      output: {
        codeSplitting: {
          // Few files: a first visit over a slow line pays for every request.
          groups: [
            { name: 'core', test: /[\\/]node_modules[\\/](?:@?vue|pinia|vue-router|zod)[\\/]/ },
            { name: 'common', test: /[\\/](?:src|shared)[\\/]/, minShareCount: 3 },
          ],
        },
      },
    },
  },
  server: { proxy: { '/api': 'http://127.0.0.1:8080' } },
  test: {
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
})

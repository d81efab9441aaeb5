import { fileURLToPath, URL } from 'node:url'
import vue from '@vitejs/plugin-vue'
import { defineConfig } from 'vitest/config'

const alias = { '@': fileURLToPath(new URL('./src', import.meta.url)) }

export default defineConfig({
  publicDir: 'src/public',
  plugins: [vue()],
  resolve: { alias },
  build: { outDir: 'dist', target: 'es2022', assetsInlineLimit: 0, manifest: true },
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

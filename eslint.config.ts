import skipFormatting from '@vue/eslint-config-prettier/skip-formatting'
import { defineConfigWithVueTs, vueTsConfigs } from '@vue/eslint-config-typescript'
import pluginVue from 'eslint-plugin-vue'

/** The groups are read like a .gitignore, where a leading # would begin a comment. */
const away = (group: string[], message: string) => ({
  'no-restricted-imports': [
    'error',
    { patterns: [{ group: group.map((pattern) => pattern.replace(/^#/, '\\#')), message }] },
  ] as const,
})

/** The import directions: src -> shared <- server, contracts -> engine, routes -> services -> entities. */
export default defineConfigWithVueTs(
  { name: 'halyard/files', files: ['**/*.{ts,mts,vue}'] },
  { ignores: ['dist/**', 'dist-server/**', 'node_modules/**', '.halyard/**', 'test-results/**'] },
  pluginVue.configs['flat/recommended'],
  vueTsConfigs.recommended,
  {
    rules: {
      'no-console': 'error',
      'vue/multi-word-component-names': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  {
    files: ['src/**'],
    rules: away(
      ['#server/*', '**/server/**', 'express', 'typeorm', 'pg'],
      'The client never imports the server.',
    ),
  },
  {
    files: ['shared/contracts/**'],
    rules: away(
      ['#server/*', '@/*', '**/src/**', '**/server/**', 'node:*'],
      'The core imports nothing from outside.',
    ),
  },
  {
    files: ['shared/engine/**'],
    rules: away(
      ['#server/*', '@/*', '**/src/**', '**/server/**', '**/contracts/**', 'zod', 'node:*'],
      'The engine is pure: no contracts, no server, no client, no I/O.',
    ),
  },
  {
    files: ['server/**'],
    rules: away(['@/*', '**/src/**', 'vue', 'primevue/*'], 'The server never imports the client.'),
  },
  {
    files: ['server/services/**'],
    rules: away(['@/*', '**/src/**', '**/routes/**', 'express'], 'Services know nothing of routes.'),
  },
  {
    files: ['server/entities/**'],
    rules: away(['@/*', '**/routes/**', '**/services/**'], 'Entities hold columns, not decisions.'),
  },
  { files: ['scripts/**'], rules: { 'no-console': 'off' } },
  skipFormatting,
)

// @ts-check
import { pathToFileURL } from 'node:url'
import { importRules } from './scripts/lib/import-rules.mjs'

// `npm test` has types and lint settings written into a build folder of its own.
const types = process.env.WHEREFORE_BUILD_DIR ? `${process.env.WHEREFORE_BUILD_DIR}/nuxt` : new URL('./.nuxt', import.meta.url).pathname
const { default: withNuxt } = await import(pathToFileURL(`${types}/eslint.config.mjs`).href)

export default withNuxt(
  {
    ignores: ['.data/**', '.output/**', '.nuxt/**', '.build/**', 'server/database/migrations/**', 'playwright-report/**', 'test-results/**', 'coverage/**'],
  },
  {
    linterOptions: { reportUnusedDisableDirectives: 'error' },
  },
  {
    files: ['**/*.ts', '**/*.vue'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/ban-ts-comment': 'error',
    },
  },
  {
    files: ['**/*.vue'],
    rules: {
      'vue/no-v-html': 'error',
      'vue/block-order': ['error', { order: ['script', 'template', 'style'] }],
      'vue/block-lang': ['error', { script: { lang: 'ts' } }],
      // Void elements with a slash or without: a matter of taste.
      'vue/html-self-closing': 'off',
      'vue/multi-word-component-names': 'off',
    },
  },
  ...importRules,
)

import js from '@eslint/js'
import prettier from 'eslint-config-prettier'
import { createNodeResolver, importX } from 'eslint-plugin-import-x'
import jsdoc from 'eslint-plugin-jsdoc'
import vue from 'eslint-plugin-vue'
import tseslint from 'typescript-eslint'

const root = import.meta.dirname

/** One import rule of the house: files of `folder` may not import what `patterns` match. */
const forbid = (files, ...patterns) => ({
  files,
  rules: {
    'no-restricted-imports': [
      'error',
      { patterns: patterns.map(([regex, message]) => ({ regex, message })) },
    ],
  },
})

/** Inside shared/: evidence and tables → inversion → smoothing → histogram → numeric → errors, units. */
const sharedLayers = [['errors', 'units', 'numeric'], ['histogram'], ['smoothing'], ['inversion'], ['forms']]
const sharedLayerRules = sharedLayers.flatMap((folders, level) => {
  const above = [
    ...sharedLayers.slice(level + 1).flat(),
    'intake',
    'basins',
    'flatness',
    'correlation',
    'joint-potential',
    'tables',
    'layouts',
    'mapping',
    'contracts',
  ]
  return folders.map((folder) =>
    forbid(
      [`shared/${folder}/**/*.ts`],
      [`^\\.\\./(${above.join('|')})(/|$)`, `shared/${folder} stands below that folder.`],
      ['(^|/)(src|server)/', 'shared/ imports nothing from src or server.'],
      ['^(node:|vue|express|typeorm|echarts)', 'shared/ knows no DOM, Node, Vue or Express.'],
    ),
  )
})

export default tseslint.config(
  { ignores: ['dist', 'node_modules', '.data'] },
  js.configs.recommended,
  ...tseslint.configs.recommendedTypeChecked,
  ...vue.configs['flat/recommended'],
  {
    languageOptions: {
      parserOptions: {
        parser: tseslint.parser,
        projectService: true,
        extraFileExtensions: ['.vue'],
        tsconfigRootDir: root,
      },
    },
    plugins: { 'import-x': importX },
    settings: {
      'import-x/resolver-next': [
        createNodeResolver({
          extensions: ['.ts', '.vue', '.js'],
          alias: { '@': [`${root}/src`], '@shared': [`${root}/shared`] },
        }),
      ],
    },
    rules: {
      'no-undef': 'off',
      'import-x/no-cycle': 'error',
      'import-x/no-default-export': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      'vue/component-api-style': ['error', ['script-setup']],
      'vue/define-macros-order': 'error',
      'vue/multi-word-component-names': 'off',
    },
  },
  {
    files: ['shared/**/*.ts', 'src/{composables,stores}/**/*.ts', 'server/services/**/*.ts'],
    plugins: { jsdoc },
    rules: {
      'jsdoc/require-jsdoc': [
        'error',
        { publicOnly: true, require: { FunctionDeclaration: true, ClassDeclaration: true } },
      ],
    },
  },
  forbid(
    ['shared/**/*.ts'],
    ['(^|/)(src|server)/', 'shared/ imports nothing from src or server.'],
    ['^(node:|vue|express|typeorm|echarts)', 'shared/ knows no DOM, Node, Vue or Express.'],
  ),
  ...sharedLayerRules,
  forbid(['src/**/*.{ts,vue}'], ['(^|/)server/', 'The browser never imports the server.']),
  forbid(
    ['src/components/base/**/*.{ts,vue}'],
    ['^@/(stores|composables|api|views|components/(?!base))', 'Base components stand alone.'],
  ),
  forbid(['src/workers/**/*.ts'], ['^@/', 'Workers import shared/ only.']),
  forbid(
    ['server/routes/**/*.ts'],
    ['/entities/', 'Routes call services; only services know entities.'],
    ['(^|/)src/', 'The server never imports the browser.'],
  ),
  forbid(['server/migrations/**/*.ts'], ['^(?!typeorm$)', 'Migrations import typeorm only.']),
  {
    files: [
      '*.config.{js,ts}',
      'src/env.d.ts',
      'tests/support/closing-line-reporter.ts',
      'tests/support/*-setup.ts',
    ],
    rules: { 'import-x/no-default-export': 'off' },
  },
  { files: ['**/*.vue'], rules: { 'import-x/no-default-export': 'off' } },
  { files: ['**/*.{js,mjs}'], extends: [tseslint.configs.disableTypeChecked] },
  {
    files: ['tests/**/*.ts'],
    rules: { '@typescript-eslint/unbound-method': 'off' },
  },
  prettier,
)

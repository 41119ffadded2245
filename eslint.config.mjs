import withNuxt from './.nuxt/eslint.config.mjs'

const length = { skipBlankLines: true, skipComments: true }

export default withNuxt(
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': ['error', { 'ts-ignore': true, 'ts-expect-error': true, 'ts-nocheck': true }],
      '@stylistic/max-statements-per-line': ['error', { max: 2 }],
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'] }],
      'max-lines': ['error', { max: 300, ...length }],
      'max-lines-per-function': ['error', { max: 50, ...length }],
      'eqeqeq': ['error', 'always', { null: 'ignore' }],
      'no-console': 'error',
      '@stylistic/operator-linebreak': 'off',
      '@stylistic/quote-props': 'off',
      'nuxt/nuxt-config-keys-order': 'off',
    },
  },
  // A page or a component holds its whole set-up in one function; the file's own cap is the measure there.
  { files: ['**/*.vue'], rules: { 'max-lines': ['error', { max: 200, ...length }], 'max-lines-per-function': 'off', 'vue/multi-word-component-names': 'off' } },
  // Layout inside templates is left to the writer: one rule here would make every short element tall.
  { files: ['**/*.vue'], rules: Object.fromEntries(['singleline-html-element-content-newline', 'multiline-html-element-content-newline', 'max-attributes-per-line', 'first-attribute-linebreak', 'html-closing-bracket-newline', 'html-self-closing', 'attributes-order', 'require-default-prop'].map(name => [`vue/${name}`, 'off'])) },
  // Test suites are long lists of small cases; tables of data are as long as they are.
  { files: ['tests/**', 'db/seed/**', 'db/schema/**', 'shared/library/**', 'shared/words/**', 'shared/planning/examples/**'], rules: { 'max-lines': 'off', 'max-lines-per-function': 'off' } },
  { files: ['scripts/**', 'server/**', 'tests/**', 'config/**'], rules: { 'no-console': 'off' } },
  { ignores: ['db/migrations/**', '.output/**', '.data/**', 'coverage/**'] },
)

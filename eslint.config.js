import query from '@tanstack/eslint-plugin-query';
import a11y from 'eslint-plugin-jsx-a11y';
import hooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

const impure = [
  { selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']", message: 'Pass the time in.' },
  { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: 'Pass the time in.' },
  { selector: "MemberExpression[object.name='Math'][property.name='random']", message: 'Pass randomness in.' },
  { selector: 'AwaitExpression', message: 'The domain does no I/O.' },
];
const noDefault = { selector: 'ExportDefaultDeclaration', message: 'Named exports only.' };
const socketWords = {
  selector: "CallExpression[callee.property.name=/^(on|emit)$/][callee.object.name=/^(socket|io|namespace)$/]",
  message: 'Sockets are spoken in platform/realtime and src/app/realtime.ts only.',
};
const wording = 'Wording comes from src/shared/text.';
const literalText = [
  { selector: 'JSXText[value=/[A-Za-z]{2,}/]', message: wording },
  { selector: 'JSXElement > JSXExpressionContainer > Literal[value=/[A-Za-z]{2,}/]', message: wording },
  { selector: "JSXAttribute[name.name=/^(aria-label|aria-description|title|alt|placeholder)$/] > Literal[value=/[A-Za-z]{2,}/]", message: wording },
];

export default tseslint.config(
  { ignores: ['dist', '.data', 'node_modules', 'coverage'] },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.base],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      '@typescript-eslint/no-unnecessary-type-assertion': 'error',
      'max-lines': ['error', { max: 300, skipBlankLines: true, skipComments: true }],
      'max-lines-per-function': ['error', { max: 60, skipBlankLines: true, skipComments: true }],
      'no-restricted-syntax': ['error', noDefault, socketWords],
      eqeqeq: 'error',
      'no-console': 'error',
    },
  },
  { files: ['tests/**', '**/*.test.{ts,tsx}'], rules: { 'max-lines-per-function': 'off', '@typescript-eslint/no-non-null-assertion': 'off' } },
  { files: ['server/{cli,fakes}/**', 'server/main.ts', 'tests/bench/**'], rules: { 'no-console': 'off' } },
  { files: ['*.config.ts', 'knexfile.ts', 'vite.config.ts'], rules: { 'no-restricted-syntax': 'off' } },
  { files: ['server/platform/realtime/**', 'src/app/realtime.ts', 'tests/**'], rules: { 'no-restricted-syntax': ['error', noDefault] } },
  {
    files: ['src/shared/domain/**/*.ts'],
    ignores: ['**/*.test.ts'],
    rules: {
      'no-restricted-syntax': ['error', noDefault, ...impure],
      'no-restricted-globals': ['error', 'process', 'window', 'document', 'fetch', 'localStorage', 'setTimeout', 'setInterval', 'crypto'],
    },
  },
  {
    files: ['src/**/*.tsx'],
    plugins: { 'jsx-a11y': a11y, 'react-hooks': hooks, '@tanstack/query': query },
    rules: {
      ...a11y.flatConfigs.recommended.rules,
      'react-hooks/rules-of-hooks': 'error',
      'react-hooks/exhaustive-deps': 'error',
      '@tanstack/query/exhaustive-deps': 'error',
      '@tanstack/query/no-unstable-deps': 'error',
      'no-restricted-syntax': ['error', noDefault, socketWords, ...literalText],
      'max-lines-per-function': ['error', { max: 90, skipBlankLines: true, skipComments: true }],
    },
  },
  {
    files: ['server/capabilities/**/*.ts'],
    ignores: ['**/routes.ts'],
    rules: {
      'no-restricted-imports': ['error', { paths: [{ name: 'express', message: 'HTTP stops at routes.ts.' }, { name: 'socket.io', message: 'Emit through the outbox.' }] }],
    },
  },
  {
    files: ['server/**/*.ts', 'jobs/**/*.ts', 'migrations/**', 'seeds/**'],
    ignores: ['server/config.ts'],
    rules: { 'no-restricted-properties': ['error', { object: 'process', property: 'env', message: 'Read server/config.ts.' }] },
  },
);

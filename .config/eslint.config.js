import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import { resolve } from 'node:path';
import ts from 'typescript-eslint';
import { layerRule } from './layer-rule.js';

const root = resolve(import.meta.dirname, '..');
const typed = ['**/*.ts', '**/*.svelte', '**/*.svelte.ts'];

const house = {
  'layers/direction': 'error',
  'max-lines': ['error', { max: 400 }],
  'no-console': 'error',
  // Coefficient tables are quoted as published, with more digits than a double holds.
  'no-loss-of-precision': 'off',
  eqeqeq: 'error',
  'no-restricted-imports': [
    'error',
    {
      patterns: [
        {
          regex: '^\\.{1,2}/(?!.*\\.(js|svelte|css|json|ts\\?worker)(\\?\\w+)?$)',
          message: 'Relative imports end in .js.',
        },
      ],
    },
  ],
};

const houseTyped = {
  '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'separate-type-imports' }],
  '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
  '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
  '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
  // Index access is typed as present (see tsconfig.base.json), so a check of it looks needless to this rule and is not.
  '@typescript-eslint/no-unnecessary-condition': 'off',
  '@typescript-eslint/consistent-type-definitions': 'off',
  '@typescript-eslint/no-confusing-void-expression': [
    'error',
    { ignoreArrowShorthand: true, ignoreVoidReturningFunctions: true },
  ],
  '@typescript-eslint/no-misused-spread': ['error', { allow: ['string'] }],
  '@typescript-eslint/unified-signatures': 'off',
  // Takes a class of a declaration file, such as Electron's, for another one of the same name.
  '@typescript-eslint/no-unsafe-class-instance-assignment': 'off',
  // planck marks only the call without `new` as deprecated, and the rule cannot tell the two apart.
  '@typescript-eslint/no-deprecated': ['error', { allow: [{ from: 'package', package: 'planck', name: 'World' }] }],
};

export default ts.config(
  { ignores: ['dist/**', 'out/**', 'coverage/**', 'node_modules/**', 'assets/**'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  js.configs.recommended,
  { plugins: { layers: { rules: { direction: layerRule } } }, rules: house },
  { files: typed, extends: [ts.configs.strictTypeChecked, ts.configs.stylisticTypeChecked], rules: houseTyped },
  ...svelte.configs.recommended,
  {
    files: typed,
    languageOptions: {
      parserOptions: {
        projectService: true,
        tsconfigRootDir: root,
        extraFileExtensions: ['.svelte'],
      },
    },
  },
  {
    files: ['**/*.svelte', '**/*.svelte.ts'],
    languageOptions: { parserOptions: { parser: ts.parser }, globals: globals.browser },
  },
  {
    files: ['**/*.svelte'],
    rules: { 'prefer-const': 'off', 'svelte/prefer-const': ['error', { excludedRunes: ['$props', '$derived'] }] },
  },
  { files: ['main/**/*.js', '.config/**'], languageOptions: { globals: globals.node } },
  {
    files: ['main/cli/**', 'main/build/**', 'main/serve/**', 'tests/bench/**', '.config/**'],
    rules: { 'no-console': 'off' },
  },
  {
    files: ['tests/**'],
    rules: {
      '@typescript-eslint/no-non-null-assertion': 'off',
      'no-console': 'off',
      'max-lines': ['error', { max: 600 }],
    },
  },
  prettier,
  ...svelte.configs.prettier,
);

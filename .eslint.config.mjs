import js from '@eslint/js';
import next from '@next/eslint-plugin-next';
import prettier from 'eslint-config-prettier';
import reactHooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import tseslint from 'typescript-eslint';

const ownEnvironment =
  'Read the environment through lib/env.ts, which checks it once; nothing else may.';

export default tseslint.config(
  {
    ignores: [
      '.next/**',
      '.data/**',
      '.build/**',
      'coverage/**',
      'next-env.d.ts',
      'lib/language/parser/**',
    ],
  },
  js.configs.recommended,
  {
    linterOptions: { reportUnusedDisableDirectives: 'error', noInlineConfig: true },
    rules: {
      eqeqeq: 'error',
      'no-console': ['error', { allow: ['error', 'warn'] }],
      'no-restricted-syntax': [
        'error',
        {
          selector: "MemberExpression[property.name='skip'][object.name=/^(it|test|describe)$/]",
          message: 'A test runs or is removed.',
        },
        {
          selector: "MemberExpression[property.name='only'][object.name=/^(it|test|describe)$/]",
          message: 'All tests run.',
        },
        {
          selector: "MemberExpression[property.name='todo'][object.name=/^(it|test|describe)$/]",
          message: 'A test is written or not there.',
        },
      ],
    },
  },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
    },
  },
  {
    files: ['app/**', 'components/**'],
    extends: [reactHooks.configs.flat.recommended],
    plugins: { '@next/next': next },
    rules: {
      ...next.configs.recommended.rules,
      ...next.configs['core-web-vitals'].rules,
      // A logo is small, private and kept by its hash: there is nothing to optimise on the way.
      '@next/next/no-img-element': 'off',
    },
  },
  {
    files: ['app/**', 'components/**', 'lib/**', 'db/**', 'proxy.ts'],
    ignores: ['lib/env.ts', 'lib/setup/**'],
    rules: {
      'no-restricted-properties': [
        'error',
        { object: 'process', property: 'env', message: ownEnvironment },
      ],
      'no-restricted-imports': [
        'error',
        { paths: [{ name: 'node:process', message: ownEnvironment }] },
      ],
    },
  },
  { files: ['**/*.mjs'], languageOptions: { globals: globals.node } },
  {
    // Matchers and parsed answers are untyped; what a test asserts of them is the check.
    files: ['tests/**'],
    rules: {
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/unbound-method': 'off',
    },
  },
  prettier,
);

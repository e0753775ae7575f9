import { defineConfig, globalIgnores } from 'eslint/config';
import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTs from 'eslint-config-next/typescript';

/** What each layer may not import: the arrow of dependencies points one way (see DEVELOPERS.md). */
const forbid = (files, groups, message) => ({
  files,
  rules: { 'no-restricted-imports': ['error', { patterns: [{ group: groups, message }] }] },
});

export default defineConfig([
  globalIgnores(['.next/**', '.next-*/**', 'next-env.d.ts', 'test-results/**', 'public/**']),
  ...nextVitals,
  ...nextTs,
  {
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  forbid(
    ['diagram/**/*.ts'],
    ['react', 'react-dom', 'react/*', 'reactflow', 'next', 'next/*', 'sequelize', 'pg', 'node:*', 'fs', 'path', 'zustand',
      '@/app/*', '@/components/*', '@/lib/*', '@/models/*', '@/tests/*'],
    'diagram/ is pure: it imports nothing but zod and itself.',
  ),
  {
    files: ['diagram/**/*.ts'],
    rules: {
      'no-restricted-globals': ['error', 'window', 'document', 'navigator', 'fetch', 'localStorage', 'process', 'Date', 'setTimeout'],
    },
  },
  forbid(['models/**/*.ts'], ['@/app/*', '@/components/*', '@/lib/*', '@/tests/*', 'react', 'next', 'next/*'], 'models/ imports only models and diagram.'),
  forbid(['lib/shared/**/*.ts'], ['@/app/*', '@/components/*', '@/lib/server/*', '@/models/*', 'sequelize', 'node:*', 'next/*'], 'lib/shared is safe in a browser.'),
  forbid(['lib/server/**/*.ts'], ['@/app/*', '@/components/*', 'react-dom'], 'lib/server imports no screen.'),
  forbid(['components/**/*.{ts,tsx}'], ['@/app/*', '@/lib/server/*', '@/models/*', 'sequelize', 'pg', 'node:*'], 'components never reach the server side.'),
  { files: ['**/*.cjs', '.sequelizerc'], rules: { '@typescript-eslint/no-require-imports': 'off' } },
]);

import { defineConfig, globalIgnores } from 'eslint/config';
import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTs from 'eslint-config-next/typescript';

/**
 * Forbids imports from the named top folders; the message says what to do instead. The fixed
 * vocabularies (db/enums) are pure and may be read anywhere.
 */
const forbid = (folders, message) => ({
  'no-restricted-imports': [
    'error',
    { patterns: folders.map((folder) => ({ regex: `^(@|(\\.\\./)+)/?${folder}(?!/enums$)(/|$)`, message })) },
  ],
});

export default defineConfig([
  ...nextVitals,
  ...nextTs,
  globalIgnores(['.next/**', 'next-env.d.ts', 'data/**', 'playwright-report/**', 'test-results/**']),
  {
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'react/no-danger': 'error',
    },
  },
  // Imports run one way: app → components → lib → db; anyone may use stats.
  { files: ['app/**'], rules: forbid(['db', 'tests'], 'Pages ask lib/ for data; only lib/ talks to db/.') },
  { files: ['components/**'], rules: forbid(['app', 'db', 'tests'], 'Components get data as props; move shared code to lib/.') },
  { files: ['lib/**'], rules: forbid(['app', 'components', 'tests'], 'The domain knows nothing of screens; move shared code to lib/.') },
  { files: ['db/**'], rules: forbid(['app', 'components', 'lib', 'tests'], 'db/ knows only itself (and stats/); move the logic to lib/.') },
  {
    files: ['stats/**'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            { group: ['@/**', 'node:*', '**/../../**'], message: 'stats/ imports nothing of ours and nothing of Node.' },
          ],
        },
      ],
      'no-restricted-globals': [
        'error',
        { name: 'Date', message: 'Statistics know no clock.' },
        { name: 'process', message: 'Statistics run in the browser too.' },
      ],
    },
  },
]);

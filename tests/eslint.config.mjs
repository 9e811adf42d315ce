import path from 'node:path';
import { fileURLToPath } from 'node:url';
import next from 'eslint-config-next';
import coreWebVitals from 'eslint-config-next/core-web-vitals';
import typescript from 'eslint-config-next/typescript';

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..');

/**
 * The arrows of the house: engine ← db ← lib/server ← app, and engine ← lib/schemas ← lib/client ← components ← app; engine ←
 * lib/engraving, which both sides may use.
 */
const zones = [
  { target: './engine', from: ['./app', './components', './db', './lib'] },
  { target: './db', from: ['./app', './components', './lib'] },
  { target: './lib', from: ['./app', './components'] },
  { target: ['./lib/schemas', './lib/client', './lib/engraving'], from: ['./lib/server', './db'] },
  { target: './lib/engraving', from: ['./lib/client', './lib/schemas'] },
  { target: './components', from: ['./app', './db', './lib/server'] },
];

const beyondTheEngine = ['react', 'react/*', 'react-dom', 'react-dom/*', 'next', 'next/*', 'next-auth*', 'drizzle-orm*', 'pg', '@tanstack/*', 'tone', 'vexflow*', 'node:*', '@/*'];

/** Readers and writers of files: in engine/exchange alone. */
const ofExchange = ['saxes', 'fflate', 'midi-file'];

const config = [
  { ignores: ['node_modules/**', '.next/**', '.data/**', 'next-env.d.ts', 'test-results/**', 'playwright-report/**'] },
  ...next,
  ...coreWebVitals,
  ...typescript,
  {
    settings: { 'import/resolver': { typescript: { project: path.join(root, 'tsconfig.json') } } },
    rules: {
      'import/no-restricted-paths': ['error', { basePath: root, zones }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      '@typescript-eslint/no-explicit-any': 'error',
      'no-console': 'error',
    },
  },
  { files: ['scripts/**', 'db/seed.ts', 'tests/**'], rules: { 'no-console': 'off' } },
  {
    files: ['engine/**'],
    rules: {
      'no-restricted-imports': ['error', { patterns: [...beyondTheEngine, ...ofExchange] }],
      'no-restricted-globals': ['error', 'Date', 'fetch', 'process', 'window', 'document', 'setTimeout', 'performance'],
      'no-restricted-properties': ['error', { object: 'Math', property: 'random', message: 'Randomness is an argument.' }],
      'no-restricted-syntax': ['error', { selector: "CallExpression[callee.name='parseFloat']", message: 'Lengths are exact.' }],
    },
  },
  { files: ['engine/exchange/**'], rules: { 'no-restricted-imports': ['error', { patterns: beyondTheEngine }] } },
];

export default config;

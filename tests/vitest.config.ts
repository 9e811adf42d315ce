import path from 'node:path';
import { defineConfig } from 'vitest/config';

const root = path.resolve(import.meta.dirname, '..');

export default defineConfig({
  root,
  resolve: {
    alias: { '@': root, 'server-only': path.join(root, 'node_modules/server-only/empty.js') },
  },
  test: {
    include: ['tests/{engine,reference,engraving,db,api,client}/**/*.test.ts'],
    environment: 'node',
    testTimeout: 60_000,
    hookTimeout: 60_000,
  },
});

import { fileURLToPath } from 'node:url';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));
const alias = {
  '@': root.replace(/\/$/, ''),
  // Next alone resolves this marker; outside of it an empty module stands in.
  'server-only': fileURLToPath(new URL('./tests/support/empty.ts', import.meta.url)),
};

export default defineConfig({
  plugins: [react()],
  resolve: { alias },
  test: {
    reporters: ['default', './tests/support/closing-line.ts'],
    projects: [
      { extends: true, test: { name: 'unit', include: ['tests/unit/**/*.test.{ts,tsx}'], testTimeout: 20_000 } },
      {
        extends: true,
        test: {
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
      // Not part of `npm test`: `npm run bench`.
      { extends: true, test: { name: 'bench', include: ['tests/bench/**/*.bench.ts'], fileParallelism: false } },
      { extends: true, test: { name: 'reference', include: ['tests/reference/**/*.test.ts'], testTimeout: 300_000 } },
    ],
  },
});

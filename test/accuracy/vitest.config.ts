import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';
import { alias } from '../vitest.config.ts';

export default defineConfig({
  root: fileURLToPath(new URL('../..', import.meta.url)),
  resolve: { alias },
  test: { include: ['test/accuracy/print.test.ts'], testTimeout: 300_000 },
});

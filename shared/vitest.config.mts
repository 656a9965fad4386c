import { defineConfig } from 'vitest/config';

export default defineConfig({
  // A machine that does other things too must not fail a test by the clock.
  test: { include: ['src/**/*.spec.ts'], testTimeout: 60_000 },
});

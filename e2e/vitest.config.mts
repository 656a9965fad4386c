import { defineConfig } from 'vitest/config';

// Browser journeys: each starts a built server on a port and a database of its own (PEGWELL_TEST_DATABASE_URL)
// and drives Debian's Chromium. Two files at a time, one for each core of a small machine.
export default defineConfig({
  test: {
    environment: 'node',
    include: ['e2e/**/*.e2e.ts'],
    maxWorkers: 2,
    testTimeout: 120_000,
    hookTimeout: 60_000,
  },
});

import { defineConfig } from 'vitest/config';

// Browser journeys: each starts a built server on a port and a database of its own (PEGWELL_TEST_DATABASE_URL)
// and drives Debian's Chromium. One file at a time: some measure how soon a phone follows.
export default defineConfig({
  test: {
    environment: 'node',
    include: ['e2e/**/*.e2e.ts'],
    fileParallelism: false,
    testTimeout: 120_000,
    hookTimeout: 60_000,
  },
});

import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  plugins: [react()],
  resolve: { conditions: ['pegwell-source', 'module', 'browser', 'development|production'] },
  test: {
    environment: 'jsdom',
    testTimeout: 60_000,
    include: ['src/**/*.spec.{ts,tsx}'],
    setupFiles: ['src/lib/test-setup.ts'],
  },
});

import { defineConfig } from 'drizzle-kit';

// The schema is one glob: tables live with their feature.
export default defineConfig({
  dialect: 'postgresql',
  schema: './server/src/**/*.table.ts',
  out: './server/src/database/migrations',
  casing: 'snake_case',
});

import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

// In development the pages are served by Vite and the API by Nest; one origin for the browser,
// so that the cookie and the Origin check work as they do in production.
const api = process.env['PEGWELL_API'] ?? 'http://127.0.0.1:3001';

export default defineConfig({
  plugins: [react()],
  resolve: { conditions: ['pegwell-source', 'module', 'browser', 'development|production'] },
  server: { host: '127.0.0.1', strictPort: true, proxy: { '/api': { target: api } } },
  build: { target: 'es2022', sourcemap: false, assetsInlineLimit: 0 },
});

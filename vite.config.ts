import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

// `npm run dev` tells where it started the API; the default serves a bare `npx vite`.
const api = process.env['RINGSTEAD_API'] ?? 'http://127.0.0.1:4600';

export default defineConfig({
  plugins: [react()],
  server: { host: '127.0.0.1', strictPort: true, proxy: { '/api': api } },
  build: {
    outDir: 'dist/client',
    emptyOutDir: true,
    target: 'es2022',
    // Everything is a file of its own: the security policy lets no data: address in.
    assetsInlineLimit: 0,
    // The viewer (three.js) and the unit parser (mathjs) are each one large chunk, loaded when needed.
    chunkSizeWarningLimit: 1200,
  },
  worker: { format: 'es' },
});

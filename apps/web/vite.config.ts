import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

const api = process.env.API_URL ?? 'http://127.0.0.1:8440';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  // Nothing is inlined: fonts come from this origin only, as the api's content security policy says.
  build: {
    outDir: 'dist',
    sourcemap: true,
    target: 'es2023',
    assetsInlineLimit: 0,
    chunkSizeWarningLimit: 900,
  },
  worker: { format: 'es' },
  server: { host: '127.0.0.1', proxy: { '/api': api, '/healthz': api } },
});

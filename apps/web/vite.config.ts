import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

const api = process.env.API_URL ?? 'http://127.0.0.1:8440';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  build: { outDir: 'dist', sourcemap: true, target: 'es2023', chunkSizeWarningLimit: 900 },
  worker: { format: 'es' },
  server: { host: '127.0.0.1', proxy: { '/api': api, '/healthz': api } },
});

import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

// The development server hands what the API answers through from the server beside it: see scripts/dev.mjs.
const api = process.env['API_URL'] ?? 'http://127.0.0.1:4780';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  publicDir: 'src/public',
  // Nothing inlined: the content policy takes fonts and pictures from this origin alone.
  build: { outDir: 'dist/client', emptyOutDir: true, target: 'es2022', assetsInlineLimit: 0 },
  server: {
    host: '127.0.0.1',
    port: 5173,
    strictPort: true,
    proxy: { '/api': { target: api } },
    watch: { ignored: ['**/.data/**', '**/.test/**', '**/dist/**'] },
  },
});

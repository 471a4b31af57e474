import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

const SERVER = 'http://127.0.0.1:4310';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  // Nothing inlined: the content security policy allows files of our own origin only.
  build: { outDir: 'dist/client', emptyOutDir: true, assetsInlineLimit: 0 },
  server: {
    proxy: {
      '/api': SERVER,
      '/socket.io': { target: SERVER, ws: true },
    },
  },
});

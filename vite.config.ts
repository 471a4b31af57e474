import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig, type UserConfig } from 'vite';

const SERVER = 'http://127.0.0.1:4310';

const client: UserConfig = {
  plugins: [react(), tailwindcss()],
  // Nothing inlined: the content security policy allows files of our own origin only.
  build: { outDir: 'dist/client', emptyOutDir: true, assetsInlineLimit: 0 },
  server: {
    proxy: {
      '/api': SERVER,
      '/socket.io': { target: SERVER, ws: true },
    },
  },
};

const server: UserConfig = {
  publicDir: false,
  build: {
    ssr: true,
    outDir: 'dist/server',
    emptyOutDir: true,
    target: 'node20',
    rolldownOptions: {
      input: {
        main: 'server/main.ts',
        worker: 'server/jobs/worker.ts',
        demo: 'server/cli/demo.ts',
        'verify-register': 'server/cli/verify-register.ts',
      },
    },
  },
};

/** `vite build` makes the client, `vite build --mode server` the server. */
export default defineConfig(({ mode }) => (mode === 'server' ? server : client));

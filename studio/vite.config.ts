import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';
import { engineDocuments } from './engine-documents.ts';

/** Where `npm run dev` finds the server, which is started beside it. */
const api = `http://localhost:${process.env.PORT ?? '4380'}`;

export default defineConfig({
  root: import.meta.dirname,
  plugins: [react(), tailwindcss(), engineDocuments()],
  worker: { format: 'es' },
  // The server compares Origin with the host it is called by, so that name must stay as the browser sent it.
  server: { proxy: { '/api': { target: api, changeOrigin: false } } },
  build: {
    outDir: 'dist',
    emptyOutDir: true,
    target: 'es2022',
    // A font or mark inlined as data: would need another source in the Content-Security-Policy.
    assetsInlineLimit: 0,
    // Plotly alone is about 4.5 MB and loads only where strips are drawn.
    chunkSizeWarningLimit: 5000,
    rolldownOptions: {
      // A page that takes a table from the engine takes that table, not every schema: nothing happens on import.
      treeshake: { moduleSideEffects: [{ test: /\/engine\/src\//, sideEffects: false }] },
      // zod is told to do without eval in the chunk it stands in, so before any schema is made.
      output: { codeSplitting: { groups: [{ name: 'zod', test: /node_modules\/zod\/|zod-without-eval/ }] } },
    },
  },
});

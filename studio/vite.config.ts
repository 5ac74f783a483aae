import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';
import { engineDocuments } from './engine-documents.ts';

export default defineConfig({
  root: import.meta.dirname,
  plugins: [react(), tailwindcss(), engineDocuments()],
  worker: { format: 'es' },
  build: {
    outDir: 'dist',
    emptyOutDir: true,
    target: 'es2022',
    // A font or mark inlined as data: would need another source in the Content-Security-Policy.
    assetsInlineLimit: 0,
    // Plotly alone is about 4.5 MB and loads only where strips are drawn.
    chunkSizeWarningLimit: 5000,
  },
});

import { fileURLToPath } from 'node:url';
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));

export default defineConfig({
  plugins: [react(), tailwindcss()],
  resolve: { alias: { '@': here('./src') } },
  build: {
    outDir: 'dist',
    sourcemap: false,
    rollupOptions: { input: { app: here('./index.html'), display: here('./display.html') } },
  },
});

import tailwindcss from '@tailwindcss/vite'
import react from '@vitejs/plugin-react'
import { defineConfig } from 'vite'

/** Where the API answers while `npm run dev` runs; scripts/dev.mjs sets it. */
const api = `http://127.0.0.1:${process.env.API_PORT ?? 4181}`

export default defineConfig({
  plugins: [react(), tailwindcss()],
  build: {
    outDir: 'dist/client',
    emptyOutDir: true,
    // The security policy allows no data: fonts, and small files are cheap over one connection.
    assetsInlineLimit: 0,
    chunkSizeWarningLimit: 1200,
  },
  server: {
    host: '127.0.0.1',
    strictPort: true,
    proxy: { '/api': { target: api, changeOrigin: false } },
    watch: { ignored: ['**/.data/**', '**/uploads/**', '**/dist/**'] },
  },
})

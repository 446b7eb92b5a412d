// Builds three entries that share chunks: the command (main), the library (index) and what its threads run.
// Everything a run needs at once is bundled, because loading loose files is what makes a Node command slow to start;
// what only some runs need (dynamic imports) becomes chunks of its own.
import { builtinModules } from 'node:module';
import { defineConfig } from 'vite';

export default defineConfig({
  ssr: { noExternal: true },
  build: {
    ssr: true,
    target: 'node20',
    outDir: 'dist',
    emptyOutDir: true,
    minify: true,
    sourcemap: false,
    // Bundled packages ask for their licences to travel with them.
    license: { fileName: 'third-party-licenses.md' },
    rolldownOptions: {
      input: { main: 'src/cli/main.ts', index: 'src/index.ts', 'sampling-worker': 'src/sampling-worker.ts' },
      // piscina starts threads from files of its own, so it stays a package.
      external: [...builtinModules, /^node:/, 'piscina'],
      output: { format: 'es', entryFileNames: '[name].js', chunkFileNames: 'chunk-[name].js' },
    },
  },
});

// Builds three entries that share chunks: the command (main), the library (index) and what its threads run.
// Everything a run needs at once is bundled into few files, because loading loose ones is what makes a Node command slow to
// start; what only some runs need (dynamic imports) becomes chunks of its own.
import { builtinModules } from 'node:module';
import { defineConfig, type Plugin } from 'vite';

export default defineConfig({
  ssr: { noExternal: true },
  plugins: [loadChildProcessWhenUsed(), writeAsciiOnly()],
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
      input: {
        main: 'src/cli/main.ts',
        index: 'src/index.ts',
        'sampling-worker': 'src/sampling-worker.ts',
        'batch-worker': 'src/batch/batch-worker.ts',
      },
      // piscina starts threads from files of its own, resvg is machine code: they stay packages.
      external: [...builtinModules, /^node:/, 'piscina', '@resvg/resvg-js'],
      output: {
        format: 'es',
        entryFileNames: '[name].js',
        chunkFileNames: 'chunk-[name].js',
        // Each group takes along what its modules import: what every command needs, what threads draw with, the rest of
        // `keepsum test`.
        codeSplitting: {
          groups: [
            {
              name: 'common',
              test: /src\/(problem\/|result\/(version|label-words)|cli\/(arguments\/(option|scan)|streams\/write-out))/,
              priority: 3,
            },
            {
              name: 'drawing',
              test: /src\/(table\/table|null\/ordering|null\/sampled\/block-source|plan\/make-plan)\.ts$/,
              priority: 2,
            },
            // What only 2x2 tables need, in one file instead of eight.
            { name: 'two-by-two', test: /src\/(effect\/two-by-two-effects|design\/panel)\.ts$/, priority: 1 },
            { name: 'test', test: /src\/cli\/commands\/test\.ts$/, priority: 1 },
          ],
        },
      },
    },
  },
});

/** commander loads node:child_process at once, for subcommands in files of their own; none of ours is, and it takes as long as all else. */
function loadChildProcessWhenUsed(): Plugin {
  const line = "const childProcess = require('node:child_process');";
  return {
    name: 'load-child-process-when-used',
    enforce: 'pre',
    transform(code, id) {
      if (!id.endsWith('commander/lib/command.js')) return null;
      if (!code.includes(line)) this.error(`commander no longer says: ${line}`);
      return code.replace(
        line,
        "const childProcess = { spawn: (...words) => require('node:child_process').spawn(...words) };",
      );
    },
  };
}

/** One letter beyond ASCII makes a whole file two bytes a character, which takes longer to read and to compile. */
function writeAsciiOnly(): Plugin {
  return {
    name: 'write-ascii-only',
    enforce: 'post',
    generateBundle(_, bundle) {
      for (const file of Object.values(bundle)) {
        if (file.type !== 'chunk') continue;
        file.code = file.code.replace(
          /[^\0-\x7f]/g,
          (unit) => `\\u${unit.charCodeAt(0).toString(16).padStart(4, '0')}`,
        );
      }
    },
  };
}

// Builds client and server into the folder that is given. A program of its own: vite exists only once the
// dependencies are installed, and its memory goes with it.
import path from 'node:path';
import { build } from 'vite';
import { entryNames, entrySource, hasEntry } from './entries.js';
import { projectFolder } from './paths.js';

const outFolder = process.argv[2];
if (!outFolder) throw new Error('bundle.js needs the folder to build into.');

const common = /** @type {const} */ ({ root: projectFolder, logLevel: 'warn' });

await build({ ...common, build: { outDir: path.join(outFolder, 'client'), emptyOutDir: true } });
await build({
  ...common,
  build: {
    outDir: path.join(outFolder, 'server'),
    emptyOutDir: true,
    ssr: true,
    rolldownOptions: {
      input: Object.fromEntries(entryNames.filter(hasEntry).map((name) => [name, entrySource(name)])),
    },
  },
});

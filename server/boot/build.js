import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { cacheFolder, distFolder, inProject } from './paths.js';
import { runOrFail } from './run-command.js';
import { sourceHash } from './source-hash.js';
import { step } from './step.js';

const builtFrom = [
  'index.html',
  'vite.config.ts',
  'tsconfig.json',
  'package.json',
  'package-lock.json',
  'src',
];
const builtFromToo = ['server', 'shared', 'seeders', 'migrations'];
const stampFile = path.join(distFolder, 'built-from');

/**
 * Builds client and server where their sources differ from those of the last build. The build is made beside
 * the old one and takes its place when complete, so a stop half-way leaves what ran before.
 * @returns {Promise<void>}
 */
export async function ensureBuild() {
  const hash = sourceHash([...builtFrom, ...builtFromToo]);
  if (existsSync(stampFile) && readFileSync(stampFile, 'utf8') === hash) return;
  await step('Building the client and the server', async () => {
    const unfinished = path.join(cacheFolder, 'dist-new');
    const outdated = path.join(cacheFolder, 'dist-old');
    for (const folder of [unfinished, outdated]) rmSync(folder, { recursive: true, force: true });
    mkdirSync(unfinished, { recursive: true });
    const env = { ...process.env, NODE_ENV: 'production' };
    await runOrFail('The build', process.execPath, [inProject('server/boot/bundle.js'), unfinished], { env });
    writeFileSync(path.join(unfinished, 'built-from'), hash);
    if (existsSync(distFolder)) renameSync(distFolder, outdated);
    renameSync(unfinished, distFolder);
    rmSync(outdated, { recursive: true, force: true });
  });
}

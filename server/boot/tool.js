import { ensureBuild } from './build.js';
import { ensureChromium } from './chromium.js';
import { startDemoServer } from './demo-server.js';
import { ensureDependencies } from './dependencies.js';
import { withSetupLock } from './folder-lock.js';
import { ensureMariadb } from './mariadb-programs.js';
import { checkNodeVersion } from './node-version.js';
import { inProject } from './paths.js';
import { runCommand } from './run-command.js';
import { superviseCommand } from './supervise.js';

/**
 * Runs a program of tests/ against the built product on its own copy of the demo network.
 * @param {{ name: string, program: string, needsChromium: boolean }} tool `program` is TypeScript; it gets the
 *   arguments of the command line
 * @returns {void}
 */
export function runTool({ name, program, needsChromium }) {
  superviseCommand(
    async () => {
      checkNodeVersion();
      const chromium = await withSetupLock(async () => {
        await ensureDependencies();
        await ensureMariadb();
        await ensureBuild();
        return needsChromium ? ensureChromium() : '';
      });
      const server = await startDemoServer(name);
      const args = ['--import', 'tsx', inProject(program), ...process.argv.slice(2)];
      const env = { ...server.env, ...(needsChromium ? { CHROMIUM_PATH: chromium } : {}) };
      const { code } = await runCommand(process.execPath, args, { env, output: 'show' });
      return code;
    },
    { signalExitCode: 130 },
  );
}

import { mkdirSync, readdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './build.js';
import { credentialsOf } from './credentials.js';
import { ensureDependencies } from './dependencies.js';
import { lockDataFolder, withSetupLock } from './folder-lock.js';
import { ensureMariadb } from './mariadb-programs.js';
import { startMariadb } from './mariadb-server.js';
import { checkNodeVersion } from './node-version.js';
import { inProject, testDataFolder } from './paths.js';
import { freePort } from './ports.js';
import { runCommand } from './run-command.js';
import { serverEnvironment } from './server-environment.js';
import { superviseCommand } from './supervise.js';

/**
 * Runs `tests/bench/country.ts` beside an empty MariaDB with the settings of `npm start`: the program fills it with a
 * country's register, size by size, and starts the built product on it itself.
 * @param {string[]} args sizes, in values
 * @returns {void}
 */
export function runCountryBench(args) {
  superviseCommand(
    async () => {
      checkNodeVersion();
      await withSetupLock(async () => {
        await ensureDependencies();
        await ensureMariadb();
        await ensureBuild();
      });
      const folder = path.join(testDataFolder, 'bench-country');
      mkdirSync(folder, { recursive: true });
      const { descriptor: lock } = await lockDataFolder(folder);
      for (const old of readdirSync(folder)) {
        if (old !== 'lock') rmSync(path.join(folder, old), { recursive: true });
      }
      const database = await startMariadb({ folder, lock, isThrowaway: true, withAdmin: true });
      const { sessionSecret } = credentialsOf(folder);
      const settings = { database, dataFolder: folder, sessionSecret, host: '127.0.0.1', isDev: false };
      const env = {
        ...serverEnvironment({ ...settings, port: await freePort() }),
        TEST_DATABASE_OWNER_URL: database.adminUrl,
      };
      const program = inProject('tests/bench/country.ts');
      const { code } = await runCommand(process.execPath, ['--import', 'tsx', program, ...args], {
        env,
        output: 'show',
      });
      await database.stop();
      rmSync(path.join(folder, 'mariadb'), { recursive: true, force: true });
      return code;
    },
    { signalExitCode: 130 },
  );
}

import { openSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { credentialsOf } from './credentials.js';
import { startDemoCopy } from './demo-template.js';
import { freePort } from './ports.js';
import { serverEnvironment } from './server-environment.js';
import { closeAtEnd, isStopping } from './supervise.js';
import { startWebServer } from './web-server.js';

/**
 * The built product on a copy of the demo network, for a browser to work with. A server that ends (a journey may
 * kill it to see that a draft survives) is started again at the same address.
 * @param {string} name of its data folder in .data-test
 * @returns {Promise<{ env: NodeJS.ProcessEnv, folder: string, stop: () => Promise<void> }>} `env` tells a program
 *   where it is: BASE_URL, SERVER_PID_FILE, SERVER_LOG, DATABASE_URL
 */
export async function startDemoServer(name) {
  const { folder, lock, database, stop: stopDatabase } = await startDemoCopy(name);
  const { sessionSecret } = credentialsOf(folder);
  const port = await freePort();
  const settings = { database, dataFolder: folder, sessionSecret, host: '127.0.0.1', port, isDev: false };
  const env = serverEnvironment(settings);
  const logFile = path.join(folder, 'server.log');
  const pidFile = path.join(folder, 'server.pid');
  const output = openSync(logFile, 'w');
  let isWanted = true;
  const start = async () => {
    const server = await startWebServer({ env, isDev: false, lock, output });
    writeFileSync(pidFile, `${server.pid}\n`);
    void server.ended.then(async () => {
      await server.stop();
      if (isWanted && !isStopping()) current = start();
    });
    return server;
  };
  let current = start();
  const { address } = await current;
  const forget = closeAtEnd('the restarting of the server', async () => {
    isWanted = false;
  });
  return {
    folder,
    env: {
      ...process.env,
      BASE_URL: address,
      SERVER_PID_FILE: pidFile,
      SERVER_LOG: logFile,
      DATABASE_URL: database.url,
    },
    stop: async () => {
      isWanted = false;
      forget();
      await (await current).stop();
      await stopDatabase();
    },
  };
}

/**
 * The contract with the server's programs; server/config.ts reads it.
 * @param {object} settings
 * @param {{ url: string, ownerUrl: string }} settings.database
 * @param {string} settings.dataFolder
 * @param {string} settings.sessionSecret
 * @param {string} settings.host
 * @param {number} settings.port
 * @param {boolean} settings.isDev
 * @returns {NodeJS.ProcessEnv}
 */
export function serverEnvironment({ database, dataFolder, sessionSecret, host, port, isDev }) {
  return {
    ...process.env,
    NODE_ENV: isDev ? 'development' : 'production',
    DATABASE_URL: database.url,
    DATABASE_OWNER_URL: database.ownerUrl,
    DATA_DIR: dataFolder,
    SESSION_SECRET: process.env.SESSION_SECRET || sessionSecret,
    HOST: host,
    PORT: String(port),
  };
}

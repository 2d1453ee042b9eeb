import { entryCommand } from './entries.js';
import { runOrFail } from './run-command.js';
import { step } from './step.js';

/**
 * Brings tables and grants up to date as the owner, before the application connects.
 * @param {{ env: NodeJS.ProcessEnv, isDev: boolean }} options
 * @returns {Promise<void>}
 */
export async function migrate({ env, isDev }) {
  await step('Bringing tables and grants up to date', async () => {
    await runOrFail('Bringing tables and grants up to date', ...entryCommand('migrate', { isDev }), { env });
  });
}

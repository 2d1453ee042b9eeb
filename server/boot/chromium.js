import { installDebianPackages } from './debian-packages.js';
import { findProgram } from './find-program.js';

/**
 * Debian's Chromium for the journeys: Playwright's own download is not needed, and not always possible.
 * @returns {Promise<string>} path of the program
 */
export async function ensureChromium() {
  const given = process.env.CHROMIUM_PATH || findProgram('chromium');
  if (given) return given;
  await installDebianPackages({
    what: 'Chromium',
    why: 'whole journeys are tried in a browser',
    packages: ['chromium'],
    otherwise: 'Or name a Chromium that you have: CHROMIUM_PATH=/path/to/chromium',
  });
  return findProgram('chromium') ?? 'chromium';
}

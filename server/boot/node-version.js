import { BootError } from './boot-error.js';

/**
 * @param {string} [version] such as "20.19.0"
 * @throws {BootError} where the libraries of the project would fail in ways harder to read
 */
export function checkNodeVersion(version = process.versions.node) {
  const [major = 0, minor = 0] = version.split('.').map(Number);
  if (major === 20 && minor >= 19) return;
  throw new BootError(
    `This project runs on Node.js 20, version 20.19 or later; this is Node.js ${version}.`,
    'Install Node.js 20 and start again.',
  );
}

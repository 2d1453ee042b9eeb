import net from 'node:net';
import { BootError } from './boot-error.js';

/**
 * @param {string} host
 * @param {number} port 0 for any
 * @returns {Promise<number>} a port that was free a moment ago
 */
function tryPort(host, port) {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen({ host, port }, () => {
      const { port: found } = /** @type {net.AddressInfo} */ (server.address());
      server.close(() => resolve(found));
    });
  });
}

/** @returns {Promise<number>} a free port on the loopback address */
export function freePort() {
  return tryPort('127.0.0.1', 0);
}

/**
 * Asked before the long steps: nobody should wait a minute to hear that the port is taken.
 * @param {string} host
 * @param {number} port
 * @throws {BootError} where the port cannot be used
 */
export async function checkPortIsFree(host, port) {
  try {
    await tryPort(host, port);
  } catch (error) {
    const code = /** @type {NodeJS.ErrnoException} */ (error).code;
    if (code === 'EADDRINUSE') {
      throw new BootError(
        `Port ${port} on ${host} is taken by another program.`,
        `Stop that program, or choose another port: PORT=${port + 1} npm start`,
      );
    }
    throw new BootError(
      `Port ${port} on ${host} cannot be used (${code}).`,
      'Set PORT (1024 to 65535) and HOST (an address of this machine).',
    );
  }
}

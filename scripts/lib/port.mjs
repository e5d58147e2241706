// @ts-check
import { createServer } from 'node:net';
import { Failure, errorCode } from './say.mjs';

/**
 * @param {string} host
 * @param {number} port 0 takes any
 * @returns {Promise<number>} the port that could be listened on
 */
function tryListening(host, port) {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen({ host, port, exclusive: true }, () => {
      const address = probe.address();
      const taken = typeof address === 'object' && address !== null ? address.port : port;
      probe.close(() => resolve(taken));
    });
  });
}

/** @returns {Promise<number>} a port of the loopback address that nobody listens on just now */
export function freePort() {
  return tryListening('127.0.0.1', 0);
}

/**
 * Refuses an address that cannot be listened on, naming it.
 * @param {string} host
 * @param {number} port
 * @returns {Promise<number>} the port; the one chosen where 0 was asked for
 */
export async function claimPort(host, port) {
  try {
    return await tryListening(host, port);
  } catch (error) {
    const code = errorCode(error);
    if (code === 'EADDRINUSE') {
      throw new Failure(
        `port ${port} on ${host} is taken by another program`,
        `stop that program, or choose another port: PORT=${port === 65535 ? 4780 : port + 1} npm start`,
      );
    }
    if (code === 'EACCES') {
      throw new Failure(
        `port ${port} on ${host} may not be used by this account`,
        'choose a port above 1023 with PORT, and put a proxy before it',
      );
    }
    throw new Failure(
      `the address ${host} cannot be listened on (${code || String(error)})`,
      'set HOST to an address of this machine, 127.0.0.1 for this machine alone',
    );
  }
}

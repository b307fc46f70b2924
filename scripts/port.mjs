import { createServer } from 'node:net';

export const defaultPort = 8440;

/** @param {number} port */
function listens(port) {
  return new Promise((resolve) => {
    const server = createServer();
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) => resolve(error.code));
    server.listen(port, '127.0.0.1', () => server.close(() => resolve(undefined)));
  });
}

/** @param {string | undefined} text the PORT variable */
export function portNumber(text) {
  return text === undefined || text === '' ? defaultPort : Number(text);
}

/**
 * @param {string | undefined} text the PORT variable
 * @returns {Promise<string | undefined>} what is wrong with it, in words, or nothing
 */
export async function portProblem(text) {
  const port = portNumber(text);
  if (!Number.isInteger(port) || port < 1 || port > 65535) {
    return `PORT is "${text}": it must be a whole number from 1 to 65535.`;
  }
  const code = await listens(port);
  if (code === undefined) return undefined;
  if (code === 'EADDRINUSE') {
    return `Port ${port} is already in use. Stop the program that uses it, or choose another: PORT=${port + 1} npm start`;
  }
  return `Port ${port} cannot be used (${code}). Choose another: PORT=${defaultPort} npm start`;
}

/** @returns {Promise<number>} a port of loopback that nothing listens on now */
export function freePort() {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      server.close(() =>
        typeof address === 'object' && address ? resolve(address.port) : reject(new Error('no port')),
      );
    });
  });
}

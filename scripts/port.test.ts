import { createServer, type Server } from 'node:net';
import { afterEach, expect, it } from 'vitest';
import { freePort, portNumber, portProblem } from './port.mjs';

let taken: Server | undefined;
afterEach(() => new Promise<void>((resolve) => (taken ? taken.close(() => resolve()) : resolve())));

it('says that a port is in use and which other to try', async () => {
  const port = await freePort();
  taken = createServer();
  await new Promise<void>((resolve) => taken?.listen(port, '127.0.0.1', resolve));
  expect(await portProblem(String(port))).toBe(
    `Port ${port} is already in use. Stop the program that uses it, or choose another: PORT=${port + 1} npm start`,
  );
});

it('finds nothing wrong with a free port', async () => {
  expect(await portProblem(String(await freePort()))).toBeUndefined();
});

it.each(['eight', '0', '70000', '80.5'])('refuses PORT=%s', async (text) => {
  expect(await portProblem(text)).toBe(`PORT is "${text}": it must be a whole number from 1 to 65535.`);
});

it('takes 8440 where none is given', () => {
  expect([portNumber(undefined), portNumber(''), portNumber('9000')]).toEqual([8440, 8440, 9000]);
});

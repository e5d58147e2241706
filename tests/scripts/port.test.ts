import { createServer } from 'node:net';
import { once } from 'node:events';
import { describe, expect, onTestFinished, test } from 'vitest';
import { claimPort, freePort } from '#scripts/lib/port.mjs';

async function occupiedPort(host: string): Promise<number> {
  const server = createServer().listen(0, host);
  onTestFinished(() => void server.close());
  await once(server, 'listening');
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('no port');
  return address.port;
}

describe('claimPort', () => {
  test('a taken port is refused by name, with a free one proposed', async () => {
    const port = await occupiedPort('127.0.0.1');
    await expect(claimPort('127.0.0.1', port)).rejects.toMatchObject({
      message: `port ${port} on 127.0.0.1 is taken by another program`,
      mend: expect.stringMatching(/PORT=\d+ npm start/) as string,
    });
  });

  test('a port taken on every address is taken on loopback too', async () => {
    const port = await occupiedPort('0.0.0.0');
    await expect(claimPort('127.0.0.1', port)).rejects.toThrow(`port ${port}`);
  });

  test('a free port is answered, and 0 takes one', async () => {
    const port = await freePort();
    expect(await claimPort('127.0.0.1', port)).toBe(port);
    expect(await claimPort('127.0.0.1', 0)).toBeGreaterThan(1023);
  });

  test('an address of another machine is refused', async () => {
    await expect(claimPort('192.0.2.1', 0)).rejects.toThrow('192.0.2.1 cannot be listened on');
  });
});

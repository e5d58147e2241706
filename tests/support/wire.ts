import { once } from 'node:events';
import { connect, createServer } from 'node:net';
import type { AddressInfo, Socket } from 'node:net';

export interface Wire {
  /** The same address by this wire. */
  through: (url: string) => string;
  /** Ends what is connected, and refuses what comes. */
  cut: () => void;
  mend: () => void;
  close: () => void;
}

/** A wire to PostgreSQL that can be cut and mended. */
export async function wireToDatabase(): Promise<Wire> {
  const admin = new URL(process.env['TEST_DATABASE_ADMIN_URL'] ?? '');
  const target = { host: admin.hostname, port: Number(admin.port) };
  const open = new Set<Socket>();
  let cut = false;
  const server = createServer((near) => {
    if (cut) {
      near.destroy();
      return;
    }
    const far = connect(target);
    for (const [one, other] of [
      [near, far],
      [far, near],
    ] as const) {
      open.add(one);
      one.on('error', () => other.destroy());
      one.on('close', () => {
        open.delete(one);
        other.destroy();
      });
      one.pipe(other);
    }
  });
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  return {
    through: (url) => Object.assign(new URL(url), { host: `127.0.0.1:${port}` }).href,
    close: () => void server.close(),
    cut() {
      cut = true;
      for (const socket of open) socket.destroy();
    },
    mend() {
      cut = false;
    },
  };
}

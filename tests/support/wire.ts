import { once } from 'node:events';
import { type AddressInfo, connect, createServer, type Server, type Socket } from 'node:net';

/** A network between a browser and its server that can go away, in both ways in which networks do. */
export interface Wire {
  url: string;
  /** Connections end and new ones are refused: the server was killed. */
  cut(): Promise<void>;
  /** Connections stay open, and nothing comes through: the radio is gone. */
  hold(): void;
  mend(): Promise<void>;
}

export async function aWire(target: string): Promise<Wire> {
  const { hostname, port } = new URL(target);
  const open = new Set<Socket>();
  let held = false;
  const listen = async (at: number): Promise<Server> => {
    const server = createServer((near) => {
      const far = connect(Number(port), hostname);
      for (const socket of [near, far]) {
        open.add(socket);
        socket.on('close', () => open.delete(socket));
        socket.on('error', () => (near.destroy(), far.destroy()));
      }
      near.pipe(far);
      far.pipe(near);
      if (held) for (const socket of [near, far]) socket.pause();
    });
    server.listen(at, '127.0.0.1');
    await once(server, 'listening');
    return server;
  };
  let server = await listen(0);
  const at = (server.address() as AddressInfo).port;
  return {
    url: `http://127.0.0.1:${at}`,
    async cut() {
      const closed = once(server, 'close');
      server.close();
      for (const socket of open) socket.destroy();
      await closed;
    },
    hold() {
      held = true;
      for (const socket of open) socket.pause();
    },
    async mend() {
      held = false;
      for (const socket of open) socket.resume();
      if (!server.listening) server = await listen(at);
    },
  };
}

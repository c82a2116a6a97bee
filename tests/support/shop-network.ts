// The network between one browser and everything else: a forward proxy that can be slow, and that can go away in the
// middle of a request as a wireless network does, with every connection cut.
import { createServer, request as forward, type IncomingMessage, type ServerResponse } from "node:http";
import type { AddressInfo, Socket } from "node:net";
import { setTimeout as pause } from "node:timers/promises";

export type ShopNetwork = Readonly<{
  /** For the options of a browser context; addresses of this machine go through it too. */
  proxy: { server: string; bypass: string };
  /** Bytes per second that all requests together may send. */
  slow: (bytesPerSecond: number) => void;
  /** Cuts what is under way and refuses everything until `back`. */
  cut: () => void;
  back: () => void;
  close: () => Promise<void>;
}>;

export async function startShopNetwork(): Promise<ShopNetwork> {
  let rate = Infinity;
  let gone = false;
  let freeAt = 0;
  const sockets = new Set<Socket>();

  /** Waits until the line has sent so many bytes; all requests share it. */
  async function carry(bytes: number): Promise<void> {
    const now = Date.now();
    freeAt = Math.max(now, freeAt) + (bytes / rate) * 1000;
    if (freeAt - now > 5) await pause(freeAt - now);
  }

  async function pass(from: IncomingMessage, to: ServerResponse): Promise<void> {
    const onward = forward(from.url ?? "", { method: from.method, headers: from.headers });
    onward.on("response", (answer) => {
      to.writeHead(answer.statusCode ?? 502, answer.rawHeaders);
      answer.pipe(to);
    });
    onward.on("error", () => to.destroy());
    from.on("close", () => from.complete || onward.destroy());
    for await (const chunk of from) {
      await carry((chunk as Buffer).length);
      if (!onward.write(chunk)) await new Promise((resolve) => onward.once("drain", resolve));
    }
    onward.end();
  }

  const server = createServer((from, to) => {
    pass(from, to).catch(() => to.destroy());
  });
  server.on("connection", (socket) => {
    if (gone) return socket.destroy();
    sockets.add(socket);
    socket.on("close", () => sockets.delete(socket));
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const { port } = server.address() as AddressInfo;
  const cut = () => {
    gone = true;
    for (const socket of sockets) socket.destroy();
  };
  return {
    proxy: { server: `http://127.0.0.1:${port}`, bypass: "<-loopback>" },
    slow: (bytesPerSecond) => {
      rate = bytesPerSecond;
      freeAt = 0;
    },
    cut,
    back: () => {
      gone = false;
    },
    close: async () => {
      cut();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}

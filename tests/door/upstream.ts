// Small servers that stand behind the door in these tests, and a client that speaks raw HTTP.
import { createHash } from 'node:crypto';
import http from 'node:http';
import net, { type AddressInfo } from 'node:net';
import { createFront } from '@/worker/door/front';
import { openPort } from '@/worker/door/listen';
import { anyFree } from '../../scripts/ports.mjs';

export interface Upstream {
  port: number;
  seen: http.IncomingMessage[];
  sockets: net.Socket[];
  close: () => Promise<void>;
}

/** Answers with its name; accepts an upgrade and echoes what comes after it. */
export async function upstream(name: string): Promise<Upstream> {
  const seen: http.IncomingMessage[] = [];
  const sockets: net.Socket[] = [];
  const server = http.createServer((request, response) => {
    seen.push(request);
    response.setHeader('keep-alive', 'timeout=3600');
    response.end(name);
  });
  server.on('upgrade', (request: http.IncomingMessage, socket: net.Socket) => {
    seen.push(request);
    sockets.push(socket);
    const accept = createHash('sha1')
      .update(`${request.headers['sec-websocket-key'] ?? ''}258EAFA5-E914-47DA-95CA-C5AB0DC85B11`)
      .digest('base64');
    socket.write(
      `HTTP/1.1 101 Switching Protocols\r\nUpgrade: websocket\r\nConnection: Upgrade\r\nSec-WebSocket-Accept: ${accept}\r\n\r\n`,
    );
    socket.on('error', () => socket.destroy());
    socket.on('end', () => socket.end()); // an http server's sockets stay half open unless told
    socket.on('data', (chunk) => socket.write(`${name}:${chunk.toString()}`));
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    port: (server.address() as AddressInfo).port, // a TCP server's address is never a string
    seen,
    sockets,
    close: () =>
      new Promise((resolve) => {
        for (const socket of sockets) socket.destroy();
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

/** A door's front on a free port. */
export async function frontOn(options: Parameters<typeof createFront>[0]) {
  const front = createFront(options);
  const { port, servers } = await openPort(front, '127.0.0.1', await anyFree(), true);
  return {
    url: `http://127.0.0.1:${port}`,
    port,
    front,
    close: () => {
      front.close();
      for (const server of servers) {
        server.close();
        server.closeAllConnections();
      }
    },
  };
}

/** A raw upgrade: all that has come back so far, and whether the other end closed. */
export function upgrade(port: number, path: string) {
  const socket = net.connect(port, '127.0.0.1');
  const state = { text: '', closed: false };
  socket.on('data', (chunk) => {
    state.text += chunk.toString();
  });
  socket.on('close', () => {
    state.closed = true;
  });
  socket.on('error', () => {});
  socket.write(
    `GET ${path} HTTP/1.1\r\nHost: yard.example\r\nUpgrade: websocket\r\nConnection: Upgrade\r\n` +
      'Sec-WebSocket-Version: 13\r\nSec-WebSocket-Key: dGhlIHNhbXBsZSBub25jZQ==\r\nX-Forwarded-For: 6.6.6.6\r\n\r\n',
  );
  return { socket, state };
}

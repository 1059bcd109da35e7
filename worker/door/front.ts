import http, { type IncomingMessage, type ServerResponse } from 'node:http';
import { Socket } from 'node:net';
import type { Duplex } from 'node:stream';
import { createProxyServer } from 'http-proxy-3';
import { answerAbsence, PAGES_ABSENT, refuseUpgrade, WORKER_ABSENT } from './answers';
import { markClient } from './client-address';
import type { StaticFiles } from './static-files';

/** A part that accepts a request and says nothing for this long has failed it. */
const SILENCE_LIMIT_MS = 120_000;

export interface Front {
  onRequest: (request: IncomingMessage, response: ServerResponse) => void;
  onUpgrade: (request: IncomingMessage, socket: Duplex, head: Buffer) => void;
  /** Cuts every open pipe to a worker other than the one on this port. */
  cutAllBut: (workerPort: number) => void;
  close: () => void;
}

/**
 * Carries requests to web or to the leading worker, and upgrades by pipe; it does not read what it carries. What never
 * changes of the pages it sends itself.
 */
export function createFront(options: {
  webPort: number;
  leaderPort: () => number | null;
  trustProxy: boolean;
  /** Left out, web sends these too. */
  files?: StaticFiles | null;
}): Front {
  // kept connections to the parts behind; without them every asset of a page would also cost the browser a connection
  const agent = new http.Agent({ keepAlive: true, maxFreeSockets: 64, timeout: 30_000 });
  const proxy = createProxyServer({ agent, proxyTimeout: SILENCE_LIMIT_MS });
  const pipes = new Map<Duplex, { workerPort: number; inner: Socket | null }>();

  // the package throws, which would end the door, unless somebody listens; a client that resets its line is a daily thing
  proxy.on('error', (_error, _request, client) => client.destroy());
  // of one connection alone (RFC 9110, 7.6.1): web keeps its own for longer than the door keeps the client's, and a
  // client that believes web asks on a connection that is being closed
  proxy.on('proxyRes', (answer) => delete answer.headers['keep-alive']);
  proxy.on('proxyReqWs', (innerRequest, _request, socket) => {
    innerRequest.once('upgrade', (_response, inner) => {
      const pipe = pipes.get(socket);
      if (pipe === undefined)
        inner.destroy(); // cut or gone while the worker was still answering
      else pipe.inner = inner;
    });
  });

  function targetOf(request: IncomingMessage): { port: number | null; isWorker: boolean } {
    const path = (request.url ?? '').split('?')[0] ?? '';
    const isWorker = /^\/(field|live)(\/|$)/.test(path);
    return { port: isWorker ? options.leaderPort() : options.webPort, isWorker };
  }

  function carry(request: IncomingMessage, response: ServerResponse): void {
    const { port, isWorker } = targetOf(request);
    const absence = isWorker ? WORKER_ABSENT : PAGES_ABSENT;
    markClient(request, options.trustProxy);
    if (port === null) return answerAbsence(request, response, absence);
    proxy.web(request, response, { target: { host: '127.0.0.1', port } }, (error) => {
      const refused = 'code' in error && error.code === 'ECONNREFUSED';
      answerAbsence(request, response, { ...absence, status: refused ? 503 : 502 });
    });
  }

  return {
    onRequest(request, response) {
      if (options.files) options.files(request, response, () => carry(request, response));
      else carry(request, response);
    },

    onUpgrade(request, socket, head) {
      const { port, isWorker } = targetOf(request);
      socket.on('error', () => socket.destroy());
      if (port === null || !isWorker || !(socket instanceof Socket)) {
        return refuseUpgrade(socket, isWorker ? WORKER_ABSENT : NO_UPGRADE);
      }
      markClient(request, options.trustProxy);
      pipes.set(socket, { workerPort: port, inner: null });
      socket.once('close', () => pipes.delete(socket));
      proxy.ws(request, socket, head, { target: { host: '127.0.0.1', port }, agent: false }, () => {
        if (pipes.get(socket)?.inner === null) refuseUpgrade(socket, WORKER_ABSENT);
      });
    },

    cutAllBut(workerPort) {
      for (const [socket, pipe] of pipes) {
        if (pipe.workerPort === workerPort) continue;
        pipes.delete(socket);
        pipe.inner?.destroy();
        socket.destroy();
      }
    },

    close() {
      for (const [socket, pipe] of pipes) {
        pipe.inner?.destroy();
        socket.destroy();
      }
      agent.destroy();
    },
  };
}

const NO_UPGRADE = {
  status: 502,
  title: 'Nothing here speaks by upgrade',
  detail: 'Field nodes use /field/v1.',
} as const;

/** The worker's one port, on loopback: nodes and browsers by way of the door, health and metrics for machines. */
import http, { type IncomingMessage, type ServerResponse } from 'node:http';
import type { Duplex } from 'node:stream';
import type { Logger } from 'pino';
import { fieldPath, fieldReadingsPath } from '@/lib/field/frames';
import { answerProblem, refuseUpgrade } from './field/problem';

export interface Answers {
  health: () => Record<string, unknown>;
  metrics: () => string;
  postReadings: (request: IncomingMessage, response: ServerResponse) => Promise<void>;
  upgradeNode: (request: IncomingMessage, socket: Duplex, head: Buffer) => Promise<void>;
  upgradeBrowser: (request: IncomingMessage, socket: Duplex, head: Buffer) => Promise<void>;
}

export function listen(port: number, answers: Answers, log: Logger): Promise<http.Server> {
  const server = http.createServer((request, response) => {
    switch (pathOf(request)) {
      case '/health':
        response.writeHead(200, { 'content-type': 'application/json', 'cache-control': 'no-store' });
        return response.end(JSON.stringify(answers.health()));
      case '/metrics':
        response.writeHead(200, { 'content-type': 'text/plain; version=0.0.4' });
        return response.end(answers.metrics());
      case fieldReadingsPath:
        return void answers.postReadings(request, response).catch((error: unknown) => {
          log.error({ err: error }, 'a posted pack could not be answered');
          response.destroy();
        });
      default:
        request.resume();
        return answerProblem(response, 404, 'There is nothing at this path.');
    }
  });
  server.on('upgrade', (request, socket, head) => {
    socket.on('error', () => socket.destroy());
    const upgrades = { [fieldPath]: answers.upgradeNode, '/live': answers.upgradeBrowser };
    const upgrade = Object.entries(upgrades).find(([path]) => path === pathOf(request))?.[1];
    if (upgrade === undefined) return refuseUpgrade(socket, 404, 'There is nothing at this path.');
    upgrade(request, socket, head).catch((error: unknown) => {
      log.error({ err: error }, 'an upgrade could not be answered');
      socket.destroy();
    });
  });
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve(server));
  });
}

function pathOf(request: IncomingMessage): string {
  return (request.url ?? '/').split('?')[0] ?? '/';
}

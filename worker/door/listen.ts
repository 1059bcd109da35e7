import http from 'node:http';
import type { Front } from './front';

export class PortTaken extends Error {}

/** Node's own five seconds are what many a program pauses between two questions, and a connection then ends as it is used. */
const KEPT_MS = 65_000;

const LOOPBACK = ['127.0.0.1', '::1'];

/**
 * Opens the public port. On loopback both families are taken, since a browser may read `localhost` as either.
 * @throws PortTaken when the port is fixed and not free
 */
export async function openPort(front: Front, host: string | null, port: number, fixed: boolean) {
  for (let tried = port; tried < 65_536; tried += 1) {
    const servers = await tryPort(front, host === null ? LOOPBACK : [host], tried);
    if (servers !== null) return { port: tried, servers };
    if (fixed) break;
  }
  throw new PortTaken();
}

async function tryPort(front: Front, hosts: string[], port: number): Promise<http.Server[] | null> {
  const servers: http.Server[] = [];
  for (const host of hosts) {
    const server = http.createServer({ keepAliveTimeout: KEPT_MS }, front.onRequest);
    server.on('upgrade', front.onUpgrade);
    const fault = await listen(server, host, port);
    if (fault === null) servers.push(server);
    else if (fault === 'EADDRINUSE') {
      for (const opened of servers) opened.close();
      return null;
    } else if (hosts.length === 1) {
      throw new Error(`Port ${port} of ${host} cannot be opened (${fault}).`);
    } // a machine without IPv6 has no ::1; the other family serves alone
  }
  if (servers.length === 0) throw new Error(`Port ${port} cannot be opened on loopback.`);
  return servers;
}

function listen(server: http.Server, host: string, port: number): Promise<string | null> {
  return new Promise((resolve) => {
    server.once('error', (error: NodeJS.ErrnoException) => resolve(error.code ?? error.message));
    server.listen({ host, port, exclusive: true }, () => resolve(null));
  });
}

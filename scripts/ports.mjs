// Free ports on this machine.
import net from 'node:net';

/**
 * Whether a port can be listened on. Both loopback families are asked: a browser that is told `localhost` may take either,
 * and a stranger's server on one of them would answer half of the visitors.
 */
export async function isFree(port, hosts = ['127.0.0.1', '::1']) {
  for (const host of hosts) if ((await tryListen(port, host)) === 'taken') return false;
  return true;
}

/** The first free port from `from` upwards. */
export async function nextFree(from, hosts) {
  for (let port = from; port <= 65_535; port += 1) if (await isFree(port, hosts)) return port;
  return anyFree();
}

/** A port that the system says nobody uses now. */
export async function anyFree() {
  return (await severalFree(1))[0];
}

/** Several at once, and different: all are held open until the last is known. */
export async function severalFree(count) {
  const servers = await Promise.all(Array.from({ length: count }, listenAnywhere));
  const ports = servers.map((server) => server.address().port);
  await Promise.all(servers.map((server) => new Promise((resolve) => server.close(resolve))));
  return ports;
}

function listenAnywhere() {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => resolve(server));
  });
}

function tryListen(port, host) {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', (error) => {
      // no IPv6 on this machine is no reason to call a port taken
      resolve(error.code === 'EADDRNOTAVAIL' || error.code === 'EAFNOSUPPORT' ? 'absent' : 'taken');
    });
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve('free')));
  });
}

// A real broker of MQTT, a process of its own on loopback, with TLS and credentials, that a test can kill and start again.
import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { chmodSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import net from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { ensureMosquitto } from '../../scripts/mosquitto.mjs';
import { severalFree } from '../../scripts/ports.mjs';
import { until } from './until';

export const PASSWORD = 'canary-broker-password';

export class TestBroker {
  private child: ChildProcess | null = null;

  private constructor(
    private readonly folder: string,
    readonly port: number,
    /** Of the authority that its certificate is signed by. */
    readonly ca: string,
  ) {}

  /** @param users each may publish and subscribe everywhere: what a node may say is not the broker's business here */
  static async start(users: string[] = ['worker', 'node']): Promise<TestBroker> {
    const folder = mkdtempSync(path.join(tmpdir(), 'middenward-broker-'));
    const [port = 0] = await severalFree(1);
    makeCertificate(folder);
    writeFileSync(path.join(folder, 'passwords'), users.map((user) => `${user}:${PASSWORD}\n`).join(''));
    run(path.join(path.dirname(program()), '..', 'bin', 'mosquitto_passwd'), ['-U', 'passwords'], folder);
    writeFileSync(
      path.join(folder, 'mosquitto.conf'),
      [
        `listener ${port} 127.0.0.1`,
        'allow_anonymous false',
        `password_file ${folder}/passwords`,
        `certfile ${folder}/server.crt`,
        `keyfile ${folder}/server.key`,
        'persistence false',
        // started as root it would become another user, who may not read this folder
        ...(process.getuid?.() === 0 ? ['user root'] : []),
      ].join('\n'),
    );
    chmodSync(folder, 0o700);
    const broker = new TestBroker(folder, port, readFileSync(path.join(folder, 'ca.crt'), 'utf8'));
    await broker.up();
    return broker;
  }

  async up(): Promise<void> {
    let output = '';
    const child = spawn(program(), ['-c', path.join(this.folder, 'mosquitto.conf')], { stdio: 'pipe' });
    this.child = child;
    for (const stream of [child.stdout, child.stderr])
      stream.on('data', (chunk: Buffer) => (output += chunk.toString()));
    await until('the broker listens', async () => {
      if (child.exitCode !== null) throw new Error(`The broker ended.\n${output}`);
      return isOpen(this.port);
    });
  }

  async kill(): Promise<void> {
    const { child } = this;
    this.child = null;
    if (child === null || child.exitCode !== null) return;
    const gone = once(child, 'exit');
    child.kill('SIGKILL');
    await gone;
  }

  async end(): Promise<void> {
    await this.kill();
    rmSync(this.folder, { recursive: true, force: true });
  }
}

function program(): string {
  const found = ensureMosquitto();
  if (found === undefined) throw new Error('There is no Mosquitto.');
  return found;
}

/** An authority and, signed by it, a certificate for localhost. */
function makeCertificate(folder: string): void {
  const openssl = (...args: string[]) => run('openssl', args, folder);
  const subject = (name: string) => ['-subj', `/CN=${name}`];
  const fresh = ['req', '-newkey', 'ec', '-pkeyopt', 'ec_paramgen_curve:prime256v1', '-nodes'];
  openssl(
    ...fresh,
    '-x509',
    '-days',
    '2',
    '-keyout',
    'ca.key',
    '-out',
    'ca.crt',
    ...subject('test authority'),
  );
  openssl(...fresh, '-keyout', 'server.key', '-out', 'server.csr', ...subject('localhost'));
  writeFileSync(path.join(folder, 'names'), 'subjectAltName=DNS:localhost\n');
  openssl(
    ...['x509', '-req', '-in', 'server.csr', '-CA', 'ca.crt', '-CAkey', 'ca.key', '-CAcreateserial'],
    ...['-days', '2', '-out', 'server.crt', '-extfile', 'names'],
  );
}

function run(command: string, args: string[], cwd: string): void {
  const { status, stderr, error } = spawnSync(command, args, { cwd, encoding: 'utf8' });
  if (status !== 0) throw new Error(`${command} ${args[0] ?? ''} failed: ${error?.message ?? stderr}`);
}

function isOpen(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const socket = net.connect(port, '127.0.0.1');
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
  });
}

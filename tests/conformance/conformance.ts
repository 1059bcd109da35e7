/** The conformance program run as a process of its own, as a stranger runs it. */
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';

export const TOKEN = 'mw_conformance';

export interface Outcome {
  code: number | null;
  /** Promises by outcome; a broken one with what was seen. */
  kept: string[];
  broken: string[];
  leftOut: string[];
  said: string;
}

export class Stage {
  readonly folder = mkdtempSync(path.join(tmpdir(), 'conformance test '));
  private readonly started: ChildProcess[] = [];

  file(name: string, content: object): string {
    const file = path.join(this.folder, name);
    writeFileSync(file, JSON.stringify(content));
    return file;
  }

  /** @param command the node's, by the address that it dials */
  async conformance(command: (url: string) => string[], options: string[] = []): Promise<Outcome> {
    const url = `ws://127.0.0.1:${await freePort()}`;
    const run = command(url).map(quoted).join(' ');
    const program = ['scripts/conformance.mjs', url, TOKEN, '--run', run, ...options];
    return outcome(await this.ended(program));
  }

  /** The program with these arguments and nothing else. */
  async ended(program: string[]): Promise<{ code: number | null; said: string }> {
    const child = spawn(process.execPath, program, { stdio: ['ignore', 'pipe', 'pipe'] });
    this.started.push(child);
    let said = '';
    child.stdout.on('data', (chunk) => (said += String(chunk)));
    child.stderr.on('data', (chunk) => (said += String(chunk)));
    // not `exit`: what was said may still be on its way then
    const [code] = (await once(child, 'close')) as [number | null];
    return { code, said };
  }

  clear(): void {
    // its own end ends the node that it started
    for (const child of this.started) if (child.exitCode === null) child.kill('SIGTERM');
    rmSync(this.folder, { recursive: true, force: true });
  }
}

function outcome({ code, said }: { code: number | null; said: string }): Outcome {
  const of = (word: string) =>
    said.split('\n').flatMap((line) => (line.startsWith(`  ${word}`) ? [line.slice(12)] : []));
  return { code, said, kept: of('kept    '), broken: of('BROKEN  '), leftOut: of('left out') };
}

const quoted = (text: string): string => `'${text.replaceAll("'", `'\\''`)}'`;

async function freePort(): Promise<number> {
  const server = createServer();
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  server.close();
  await once(server, 'close');
  return port;
}

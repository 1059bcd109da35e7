// A line to the database that a test can cut and mend, for one process alone: the server itself is shared.
import net from 'node:net';

export class CutLine {
  private readonly sockets = new Set<net.Socket>();
  private isCut = false;
  private isSilent = false;

  private constructor(
    private readonly server: net.Server,
    readonly url: string,
  ) {}

  static async to(databaseUrl: string): Promise<CutLine> {
    const target = new URL(databaseUrl);
    const server = net.createServer();
    await new Promise<void>((resolve) => {
      server.listen(0, '127.0.0.1', resolve);
    });
    const url = new URL(databaseUrl);
    url.port = String((server.address() as net.AddressInfo).port);
    const line = new CutLine(server, url.href);
    server.on('connection', (socket) => line.carry(socket, Number(target.port)));
    return line;
  }

  cut(): void {
    this.isCut = true;
    for (const socket of this.sockets) socket.destroy();
  }

  /** Nothing is carried any more and nothing said of it: connections stand, new ones are taken, and nobody answers. */
  fallSilent(): void {
    this.isSilent = true;
    for (const socket of this.sockets) socket.unpipe().pause();
  }

  mend(): void {
    if (this.isSilent) for (const socket of this.sockets) socket.destroy();
    this.isCut = false;
    this.isSilent = false;
  }

  close(): void {
    this.cut();
    this.server.close();
  }

  private carry(socket: net.Socket, port: number): void {
    socket.on('error', () => socket.destroy());
    if (this.isCut) return void socket.destroy();
    if (this.isSilent) {
      this.sockets.add(socket);
      return void socket.on('close', () => this.sockets.delete(socket));
    }
    const inner = net.connect(port, '127.0.0.1');
    inner.on('error', () => inner.destroy());
    for (const [one, other] of [
      [socket, inner],
      [inner, socket],
    ] as const) {
      this.sockets.add(one);
      one.pipe(other);
      one.on('close', () => {
        this.sockets.delete(one);
        other.destroy();
      });
    }
  }
}

/** Lets nodes in by their token, and keeps one connection a node: a second one takes over. */
import { createHash } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { Duplex } from 'node:stream';
import { WebSocketServer } from 'ws';
import { findNodeByToken, type NodeWiring } from '@/db/queries/plan';
import { closeCode, frameBytesMax, pingEveryMs } from '@/lib/field/frames';
import type { Base } from '../base';
import type { Cancel } from '../clock';
import type { House } from '../control/house';
import type { Houses } from '../control/houses';
import type { Ingest } from './ingest';
import { SocketLine, type Line } from './line';
import { NodeLink } from './link';
import { refuseUpgrade } from './problem';
import { takePosted } from './posted';
import type { Stall } from './stall';

const TAKEOVERS_MS = 10 * 60_000;
/** The third within ten minutes: two devices fight over one token. */
const CLONED_AT = 3;

export interface GateDeps extends Base {
  houses: Houses;
  ingest: Ingest;
  stall: Stall;
  isLeading: () => boolean;
}

interface Admitted {
  house: House;
  node: NodeWiring;
  tokenHash: string;
}

export class Gate {
  private readonly sockets = new WebSocketServer({
    noServer: true,
    maxPayload: frameBytesMax,
    clientTracking: false,
  });
  private readonly links = new Map<string, NodeLink>();
  private readonly open = new Set<NodeLink>();
  /** One timer for all lines: a thousand of their own would wake the process more often than the nodes' packs do. */
  private cancelWatch: Cancel | null = null;
  private readonly takeovers = new Map<string, number[]>();

  constructor(private readonly deps: GateDeps) {}

  /** Nodes with a connection on which they said hello. */
  get online(): number {
    return this.links.size;
  }

  async upgrade(request: IncomingMessage, socket: Duplex, head: Buffer): Promise<void> {
    const admitted = await this.admit(request).catch(() => 'away' as const);
    if (admitted === 'away') return refuseUpgrade(socket, 503, 'Not ready for nodes yet; try again.');
    if (admitted === null) return refuseUpgrade(socket, 401, 'This token opens nothing here.');
    this.sockets.handleUpgrade(request, socket, head, (ws) => {
      const failed = (error: Error) =>
        this.deps.log.debug({ err: error, node: admitted.node.id }, 'the line of a node failed');
      this.carry(new SocketLine(ws, failed), admitted.house, admitted.node.id, admitted.tokenHash);
    });
  }

  /** A line that a node stands behind, as its token has shown: it is the node's from now on. */
  carry(line: Line, house: House, nodeId: string, tokenHash: string): NodeLink {
    const link = new NodeLink(line, house, nodeId, tokenHash, {
      ...this.deps,
      onHello: (one) => this.greeted(one),
      onClose: (one) => this.closed(one),
    });
    this.takeOver(link);
    this.open.add(link);
    this.cancelWatch ??= this.deps.clock.every(pingEveryMs / 4, () => this.watch());
    this.deps.stall.add(link);
    return link;
  }

  async post(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const admitted = await this.admit(request).catch(() => 'away' as const);
    await takePosted(this.deps, request, response, admitted);
  }

  /** Closes what a change of plan has shut out: revoked tokens, removed nodes. */
  recheck(houseId: string): void {
    for (const link of this.open) {
      if (link.house.id !== houseId) continue;
      if (link.node === undefined || !opens(link.node, link.tokenHash, this.deps.clock.realNow())) {
        link.close(closeCode.policy, 'this token was revoked');
      }
    }
  }

  closeAll(): void {
    for (const link of this.open) link.close(1012, 'this worker stops');
  }

  /** @returns null for a token that opens nothing, "away" while this cannot be told */
  private async admit(request: IncomingMessage): Promise<Admitted | null | 'away'> {
    const token = /^Bearer +(\S+)$/i.exec(request.headers.authorization ?? '')?.[1];
    if (token === undefined) return null;
    if (!this.deps.isLeading()) return 'away';
    const tokenHash = createHash('sha256').update(token).digest('hex');
    // Known houses first: nodes find in while the database is away.
    for (const house of this.deps.houses.all()) {
      const node = house.record.nodes.find((one) => opens(one, tokenHash, this.deps.clock.realNow()));
      if (node !== undefined) return calls(node) ? { house, node, tokenHash } : null;
    }
    const found = await findNodeByToken(this.deps.db, tokenHash);
    if (found === null) return null;
    // Made a moment ago: the notification may still be on its way.
    const house = await this.deps.houses.refresh(found.holdingId, found.houseId);
    const node = house?.record.nodes.find((one) => one.id === found.nodeId);
    if (house === undefined || node === undefined) return 'away';
    return calls(node) ? { house, node, tokenHash } : null;
  }

  /** The newest connection is the node's, from when it opens: what the token opens is not shared. */
  private takeOver(link: NodeLink): void {
    const former = [...this.open].filter((one) => one.nodeId === link.nodeId);
    for (const one of former)
      one.close(closeCode.takenOver, 'another connection with this token took over; wait 60 s');
    if (former.length > 0) this.countTakeover(link);
  }

  private greeted(link: NodeLink): void {
    if (this.links.get(link.nodeId) === link) return;
    this.links.set(link.nodeId, link);
    link.house.nodes.attach(link.nodeId, link);
  }

  private countTakeover(link: NodeLink): void {
    const { clock, metrics, log } = this.deps;
    metrics.add('takeovers_total');
    const now = clock.monotonicMs();
    const times = [...(this.takeovers.get(link.nodeId) ?? []).filter((at) => now - at < TAKEOVERS_MS), now];
    this.takeovers.set(link.nodeId, times);
    log.warn(
      { node: link.nodeId, times: times.length },
      'a connection took over from another of the same node',
    );
    if (times.length < CLONED_AT) return;
    link.house.nodes.setCloned(link.nodeId, true);
    clock.after(TAKEOVERS_MS, () => {
      const last = this.takeovers.get(link.nodeId)?.at(-1) ?? -Infinity;
      if (clock.monotonicMs() - last >= TAKEOVERS_MS) link.house.nodes.setCloned(link.nodeId, false);
    });
  }

  private watch(): void {
    for (const link of this.open) link.watch();
  }

  private closed(link: NodeLink): void {
    this.open.delete(link);
    if (this.open.size === 0) {
      this.cancelWatch?.();
      this.cancelWatch = null;
    }
    this.deps.stall.remove(link);
    if (this.links.get(link.nodeId) === link) this.links.delete(link.nodeId);
    link.house.nodes.detach(link.nodeId, link);
  }
}

/** One on a bus is gone to: two ways to one node would command it twice. */
function calls({ kind }: NodeWiring): boolean {
  return kind === 'socket' || kind === 'http';
}

function opens(node: NodeWiring, tokenHash: string, realNow: number): boolean {
  return node.tokens.some(({ hash, until }) => hash === tokenHash && (until === null || until > realNow));
}

/** Feeds browsers: how their house stands, as it changes. A slow reader gets one fresh state instead of a queue. */
import type { IncomingMessage } from 'node:http';
import type { Duplex } from 'node:stream';
import { WebSocketServer, type WebSocket } from 'ws';
import { LIVE_CLOSE, LiveRequest, type LiveFrame, type TailRecord } from '@/lib/live/frames';
import type { HouseState } from '@/lib/schema/house-state';
import { getSessionFromHeaders, type Viewer } from '@/lib/server/auth';
import { trustedOrigins } from '@/lib/server/origins';
import { may } from '@/lib/server/permissions';
import type { State } from '@/lib/control/types';
import type { Base } from '../base';
import type { Cancel } from '../clock';
import type { House } from '../control/house';
import type { ControlledHouse } from '../control/house-deps';
import type { Houses } from '../control/houses';
import { refuseUpgrade } from '../field/problem';
import { isoUtc } from '../control/state';
import { rawText } from '../raw-text';
import { Reader } from './reader';

/** A revoked session or a lowered role is noticed within this, real time. */
const RECHECK_MS = 5000;
const REQUEST_BYTES = 1024;

export interface HubDeps extends Base {
  houses: Houses;
  isLeading: () => boolean;
}

export class Hub {
  private readonly sockets = new WebSocketServer({
    noServer: true,
    maxPayload: REQUEST_BYTES,
    clientTracking: false,
  });
  private readonly readers = new Map<string, Set<Reader>>();

  private readonly cancel: Cancel;

  constructor(private readonly deps: HubDeps) {
    this.cancel = deps.clock.every(RECHECK_MS, () => void this.recheck());
  }

  get count(): number {
    return [...this.readers.values()].reduce((sum, readers) => sum + readers.size, 0);
  }

  async upgrade(request: IncomingMessage, socket: Duplex, head: Buffer): Promise<void> {
    const { origin } = request.headers;
    // Browsers always say where a page came from; a foreign page must not ride on its reader's cookie.
    if (origin === undefined || !trustedOrigins().includes(origin)) {
      return refuseUpgrade(socket, 403, 'The live feed is for this installation’s own pages.');
    }
    if (!this.deps.isLeading()) return refuseUpgrade(socket, 503, 'Not ready yet; try again.');
    const headers = new Headers({ cookie: request.headers.cookie ?? '' });
    const viewer = await getSessionFromHeaders(headers).catch(() => undefined);
    if (viewer === undefined) return refuseUpgrade(socket, 503, 'Sessions cannot be looked up; try again.');
    const wanted = new URL(request.url ?? '/', 'http://worker').searchParams.get('house') ?? '';
    // A house made a moment ago: its notification may still be on its way.
    if (viewer !== null && this.findHouse(viewer, wanted) === undefined) {
      await this.deps.houses.look().catch(() => undefined);
    }
    this.sockets.handleUpgrade(request, socket, head, (ws) => this.admit(ws, viewer, wanted, headers));
  }

  /** A house stands as told from now on. */
  publish(house: ControlledHouse, state: HouseState): void {
    const readers = this.readers.get(house.id);
    if (readers === undefined) return;
    const text = this.stateFrame(house.id, state);
    for (const reader of readers) reader.send(text);
  }

  tell(houseId: string, frame: LiveFrame): void {
    const readers = this.readers.get(houseId);
    if (readers === undefined) return;
    const text = JSON.stringify(frame);
    for (const reader of readers) reader.send(text);
  }

  tellSwitching(house: ControlledHouse, channel: number, at: number, to: State, claim: string): void {
    this.tell(house.id, { type: 'switching', house: house.id, channel, at: isoUtc(at), to, claim });
  }

  tellTail(houseId: string, node: string, told: () => TailRecord[]): void {
    const readers = [...(this.readers.get(houseId) ?? [])].filter(({ tail }) => tail === node);
    if (readers.length === 0) return;
    const frame: LiveFrame = { type: 'tail', house: houseId, node, records: told() };
    const text = JSON.stringify(frame);
    for (const reader of readers) reader.send(text);
  }

  stop(): void {
    this.cancel();
  }

  closeAll(): void {
    for (const readers of this.readers.values())
      for (const reader of readers) reader.close(1012, 'this worker stops');
  }

  private admit(ws: WebSocket, viewer: Viewer | null, wanted: string, headers: Headers): void {
    ws.on('error', () => undefined);
    const house = this.findHouse(viewer, wanted);
    const refusal = refusalOf(viewer, house);
    if (refusal !== null || house === undefined) {
      return ws.close(refusal ?? LIVE_CLOSE.notFound, 'not for you');
    }
    const reader = new Reader(ws, headers, {
      metrics: this.deps.metrics,
      clock: this.deps.clock,
      freshState: () => (house.state === null ? null : this.stateFrame(house.id, house.state)),
    });
    const readers = this.readers.get(house.id) ?? new Set();
    this.readers.set(house.id, readers.add(reader));
    ws.on('message', (data) => {
      const { data: said } = LiveRequest.safeParse(parse(rawText(data)));
      if (said === undefined) reader.close(1008, 'only {"type":"here"} and {"type":"tail"} may be said');
      else if (said.type === 'tail') reader.tail = said.node;
    });
    ws.on('close', () => {
      readers.delete(reader);
      if (readers.size === 0) this.readers.delete(house.id);
    });
    if (house.state !== null) reader.send(this.stateFrame(house.id, house.state));
  }

  /** By id, or by slug within the viewer's holding; another holding's house is as if it were not there. */
  private findHouse(viewer: Viewer | null, wanted: string): House | undefined {
    if (viewer === null) return undefined;
    return this.deps.houses
      .all()
      .find((one) => one.holdingId === viewer.holdingId && (one.id === wanted || one.record.slug === wanted));
  }

  private async recheck(): Promise<void> {
    for (const [houseId, readers] of this.readers) {
      for (const reader of readers) {
        // While the database is away nothing can be told of a session: who is in stays in.
        const viewer = await getSessionFromHeaders(reader.headers).catch(() => undefined);
        if (viewer === undefined) continue;
        const refusal = refusalOf(viewer, this.findHouse(viewer, houseId));
        if (refusal !== null) reader.close(refusal, 'not for you any more');
      }
    }
  }

  private stateFrame(house: string, state: HouseState): string {
    const { clock } = this.deps;
    const frame: LiveFrame = { type: 'state', house, state, rate: clock.rate, now: isoUtc(clock.appNow()) };
    return JSON.stringify(frame);
  }
}

function refusalOf(viewer: Viewer | null, house: House | undefined): number | null {
  if (viewer === null) return LIVE_CLOSE.signedOut;
  if (house === undefined) return LIVE_CLOSE.notFound;
  return may(viewer.role, 'holding.see') ? null : LIVE_CLOSE.notAllowed;
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

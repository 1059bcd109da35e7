/**
 * Faults that people practise on: what of a house goes wrong in the yard, and until when. They are put between the world
 * and the node, where a real fault would be; what comes over the wire is all that anybody else learns of them.
 */
import type { Coils } from '@/lib/field/frames';
import type { KeptRecord } from './backlog';

export const faultKinds = [
  'dead-sensor',
  'lying-85',
  'swapped-probes',
  'welded-relay',
  'dead-fan',
  'loop-leak',
  'lost-link',
  'power-cut',
] as const;
export type FaultKind = (typeof faultKinds)[number];

export interface TrainingFault {
  fault: FaultKind;
  /** The probe that it is about; of two that are swapped, the one. */
  point: string | null;
  other: string | null;
  relay: number | null;
  /** It ends by itself then, on the monotonic clock. */
  endsMs: number;
}

/** What a one-wire probe says that has only just got power. */
const freshProbeC = 85;
/** Of the air in a pipe that has come apart outdoors, so much is outdoor air where it comes back. */
const leakedShare = 0.8;

type Reading = Omit<KeptRecord, 't'>;

export class Faults {
  private standing: TrainingFault[] = [];

  /** One of a kind about one thing: again, it only ends later. */
  put(fault: TrainingFault): void {
    this.end(fault);
    this.standing.push(fault);
  }

  end(about: Pick<TrainingFault, 'fault' | 'point' | 'relay'>): void {
    this.standing = this.standing.filter(
      ({ fault, point, relay }) => fault !== about.fault || point !== about.point || relay !== about.relay,
    );
  }

  at(nowMs: number): TrainingFault[] {
    return this.standing.filter(({ endsMs }) => endsMs > nowMs);
  }

  has(kind: FaultKind, nowMs: number): boolean {
    return this.at(nowMs).some(({ fault }) => fault === kind);
  }

  /** Readings as they come through the wires: some are not there, some lie, some bear another's name. */
  readings(readings: Reading[], nowMs: number): Reading[] {
    return this.at(nowMs).reduce(withFault, readings);
  }

  /** Which loads run, with these coils. */
  contacts(coils: Coils, nowMs: number): Coils {
    const stuck = this.at(nowMs).flatMap(({ fault, relay }) => {
      if (relay === null || (fault !== 'welded-relay' && fault !== 'dead-fan')) return [];
      return [[String(relay), fault === 'welded-relay' ? 'on' : 'off'] as const];
    });
    return { ...coils, ...Object.fromEntries(stuck) };
  }

  /** Share of outdoor air in what the heap's loop brings back, 0 to 1. */
  leak(nowMs: number): number {
    return this.has('loop-leak', nowMs) ? leakedShare : 0;
  }
}

function withFault(readings: Reading[], { fault, point, other }: TrainingFault): Reading[] {
  switch (fault) {
    case 'dead-sensor':
      return readings.filter(({ n }) => n !== point);
    case 'lying-85':
      return readings.map((reading) => (reading.n === point ? { ...reading, v: freshProbeC } : reading));
    case 'swapped-probes': {
      const names = new Map([
        [point, other],
        [other, point],
      ]);
      return readings.map((reading) => ({ ...reading, n: names.get(reading.n) ?? reading.n }));
    }
    default:
      return readings;
  }
}

/**
 * The relays of a board that keeps no lease: what a node would do by itself is done for it here. Commands are taken by
 * number, the lease runs from when the coils were reported, and at its end every coil is dropped. Pure but for the line.
 */
import type { Coil, Coils, CommandFrame } from '@/lib/field/frames';
import type { ModbusBus } from '@/lib/schema/bus';
import { BoardException, type ModbusLine } from './modbus-line';

/** Tries at a coil that the board refuses, real ms apart. */
const TRIES = 3;
const AGAIN_AFTER_MS = 600;

export interface Written {
  /** Relays that the board refused, with its reason. */
  refused: { relay: number; why: string }[];
}

export class BoardCoils {
  /** As last read; empty while nothing is known. */
  coils: Coils = {};
  /** Greatest command number taken. */
  number = 0;
  /** Coils that were on by order and dropped: by the end of a lease, or by the board while nobody spoke to it. */
  trips = 0;
  private wanted: Coils = {};
  /** As last ordered from the board: what differs was moved by somebody else. */
  private ordered: Coils = {};

  constructor(
    private readonly settings: ModbusBus,
    private readonly count: () => number,
    /** Relays that must not be put on, whoever orders it. */
    private readonly isBarred: (relay: number) => boolean,
    private readonly pause: (ms: number) => Promise<void>,
  ) {}

  /** @returns whether somebody else has moved a coil since it was last ordered */
  read(line: ModbusLine): Promise<boolean> {
    return this.readCoils(line, true);
  }

  private async readCoils(line: ModbusLine, tellsTrips: boolean): Promise<boolean> {
    const count = this.count();
    if (count === 0) return false;
    const bits = await line.read('coil', this.settings.firstCoil, count);
    const now: Coils = Object.fromEntries(
      bits.map((bit, place) => [String(place + 1), bit === 1 ? 'on' : 'off'] as const),
    );
    const moved = Object.entries(this.ordered).filter(
      ([relay, coil]) => now[relay] !== undefined && now[relay] !== coil,
    );
    // a coil that we put on and that is off was dropped: by its watchdog, or with its power
    if (tellsTrips && moved.some(([relay]) => now[relay] === 'off')) this.trips += 1;
    this.ordered = {
      ...this.ordered,
      ...Object.fromEntries(moved.map(([relay]) => [relay, now[relay] ?? 'off'])),
    };
    this.coils = now;
    return moved.length > 0;
  }

  /** @returns whether the command is to be followed */
  take({ number, channels }: CommandFrame): boolean {
    if (number < this.number) return false;
    this.number = number;
    this.wanted = channels;
    return true;
  }

  /** Brings every coil to what was last commanded, and reads them back. */
  async apply(line: ModbusLine): Promise<Written> {
    const refused: Written['refused'] = [];
    for (let relay = 1; relay <= this.count(); relay += 1) {
      const coil = this.isBarred(relay) ? 'off' : (this.wanted[String(relay)] ?? 'off');
      if (this.coils[String(relay)] === coil) continue;
      const why = await this.write(line, relay, coil);
      if (why !== null) refused.push({ relay, why });
    }
    // one that does not follow has not dropped: it never was on
    await this.readCoils(line, false);
    return { refused };
  }

  /** @returns whether one was on */
  async drop(line: ModbusLine): Promise<boolean> {
    // one that was put on and not read back yet is on too
    const known = [...Object.entries(this.coils), ...Object.entries(this.ordered)];
    const on = new Set(known.filter(([, coil]) => coil === 'on').map(([relay]) => relay));
    this.wanted = {};
    if (on.size === 0) return false;
    for (const relay of on) await this.write(line, Number(relay), 'off');
    this.trips += 1;
    await this.readCoils(line, false);
    return true;
  }

  /** @returns why the board did not take it; null where it did */
  private async write(line: ModbusLine, relay: number, coil: Coil): Promise<string | null> {
    for (let tried = 1; ; tried += 1) {
      try {
        await line.writeCoil(this.settings.firstCoil + relay - 1, coil === 'on');
        this.ordered = { ...this.ordered, [String(relay)]: coil };
        return null;
      } catch (error) {
        if (!(error instanceof BoardException)) throw error;
        if (tried === TRIES) return error.message;
        await this.pause(AGAIN_AFTER_MS);
      }
    }
  }
}

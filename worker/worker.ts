/** The worker put together: field, control, alarms, live feed and jobs round one clock, one lead and one database. */
import type http from 'node:http';
import { tellOfGap } from './alarms/gap';
import { AlarmKeeper } from './alarms/keeper';
import type { Base } from './base';
import { keepGap } from './control/gap';
import { Journal } from './control/journal';
import { Houses } from './control/houses';
import { Lead } from './control/lead';
import { Listener } from './control/listener';
import { Buses } from './field/buses';
import { Gate } from './field/gate';
import { Ingest } from './field/ingest';
import { Stall } from './field/stall';
import { Hub } from './hub/hub';
import { Jobs } from './jobs/jobs';
import { listen } from './listen';

/** A clean end writes what it holds for this long at most; what is left is logged. */
const SETTLE_MS = 4000;

export interface RunningWorker {
  server: http.Server;
  stop: () => Promise<void>;
}

export async function startWorker(base: Base, instance: string, port: number): Promise<RunningWorker> {
  const { log, metrics } = base;
  const journal = new Journal(base);
  const ingest = new Ingest(base);
  const stall = new Stall(base);
  const alarms = new AlarmKeeper(base, (house) => hub.tell(house, { type: 'alarms', house }));
  const isLeading = () => lead.epoch !== null;
  const houses: Houses = new Houses(base, {
    journal,
    alarms,
    epoch: () => lead.epoch ?? 0,
    raiseEpoch: (seen) => {
      lead.raiseAbove(seen).then(
        (isRaised) => {
          if (isRaised) for (const house of houses.all()) house.step();
        },
        (error: unknown) => log.warn({ err: error }, 'the epoch cannot be lifted now'),
      );
    },
    onState: (house, state) => hub.publish(house, state),
    onSwitching: (house, channel, at, to, claim) => hub.tellSwitching(house, channel, at, to, claim),
    onPack: (house, nodeKey, told) => hub.tellTail(house.id, nodeKey, told),
  });
  const hub = new Hub({ ...base, houses, isLeading });
  const gate = new Gate({ ...base, houses, ingest, stall, isLeading });
  const buses = new Buses(
    {
      ...{ ...base, ingest, gate, epoch: () => lead.epoch ?? 0 },
      isSure: () => lead.isSure,
      mayDrive: () => lead.mayDrive,
    },
    houses,
  );
  const jobs = new Jobs({ ...base, houses, ingest, isLeading });
  const tellOfFormer = async (heartbeatAt: number | null, wasReleased: boolean) => {
    await keepGap(base, heartbeatAt);
    await tellOfGap(base, wasReleased ? null : heartbeatAt);
  };
  const lead: Lead = new Lead(base, instance, {
    lastStepAt: () => houses.lastStepAt(),
    onLead: async ({ formerHeartbeatAt, wasReleased }) => {
      await houses.lead(formerHeartbeatAt);
      buses.start();
      jobs.start();
      // not waited for: the lead is renewed after this, and a database that hangs just now must not hold that up
      tellOfFormer(formerHeartbeatAt, wasReleased).catch((error: unknown) => {
        log.warn({ err: error }, 'the time in which nobody led cannot be told of');
      });
    },
    onLost: () => {
      jobs.stop();
      // who leads now speaks to the boards
      void buses.stop(false);
      gate.closeAll();
      hub.closeAll();
      houses.stop(false);
    },
  });
  const complain = (error: unknown) =>
    log.warn({ err: error }, 'a notification could not be followed; the next look does it');
  const listener = new Listener(
    base,
    (channel, payload) => {
      if (!isLeading()) return;
      if (channel === 'command') houses.takeCommands(payload).catch(complain);
      if (channel === 'plan') {
        houses.planChanged(payload).then(() => {
          gate.recheck(payload);
          buses.look();
          hub.tell(payload, { type: 'plan', house: payload });
        }, complain);
      }
      if (channel === 'test_read') buses.answer().catch(complain);
      if (channel === 'alarm') {
        for (const house of houses.all().filter((one) => one.holdingId === payload)) {
          hub.tell(house.id, { type: 'alarms', house: house.id });
        }
      }
    },
    () => {
      if (isLeading()) houses.look().catch(complain);
    },
  );

  metrics.gauge('leader', '1 while this worker leads.', () => (isLeading() ? 1 : 0));
  metrics.gauge('epoch', 'Epoch of its lead.', () => lead.epoch ?? 0);
  metrics.gauge('houses', 'Houses under control.', () => houses.all().length);
  metrics.gauge('nodes_online', 'Nodes connected.', () => gate.online);
  metrics.gauge('buses_online', 'Boards and brokers connected to.', () => buses.online);
  metrics.gauge('live_readers', 'Browsers connected.', () => hub.count);
  metrics.gauge('readings_held', 'Readings not yet committed.', () => ingest.held);
  metrics.gauge('journal_held', 'Rows of control not yet committed.', () => journal.held);
  metrics.gauge('database_away', '1 while the database cannot be written.', () =>
    ingest.isAway || journal.isAway ? 1 : 0,
  );
  metrics.gauge('memory_bytes', 'Resident memory.', () => process.memoryUsage.rss());

  const server = await listen(
    port,
    {
      health: () => ({
        leader: isLeading(),
        epoch: lead.epoch,
        database: !(ingest.isAway || journal.isAway) && (lead.heartbeatAgeS ?? 0) < 10,
        field: { nodes: gate.online },
        lastStep: houses.lastStepAt(),
        heartbeat: lead.heartbeatAgeS,
      }),
      metrics: () => metrics.text(),
      postReadings: (request, response) => gate.post(request, response),
      upgradeNode: (request, socket, head) => gate.upgrade(request, socket, head),
      upgradeBrowser: (request, socket, head) => hub.upgrade(request, socket, head),
    },
    log,
  );
  void listener.start();
  lead.start();

  return {
    server,
    stop: async () => {
      listener.stop();
      jobs.stop();
      await lead.know();
      await buses.stop(isLeading());
      hub.closeAll();
      gate.closeAll();
      houses.stop(isLeading());
      server.close();
      await Promise.all([journal.settle(SETTLE_MS), ingest.settle(SETTLE_MS), alarms.settle()]);
      if (journal.held + ingest.held > 0)
        log.error({ rows: journal.held, readings: ingest.held }, 'ended with unwritten rows');
      journal.stop();
      ingest.stop();
      alarms.stop();
      stall.stop();
      hub.stop();
      await lead.stop();
      server.closeAllConnections();
    },
  };
}

// The demo's Long house as the core is given it, without a database between.
import type { DemoHouse } from '@/db/seed/demo-house';
import { longHouse } from '@/db/seed/long-house';
import { RuleBody } from '@/lib/schema/rule';
import type { HouseConfig } from '@/lib/control/types';

const slugOf = (name: string): string => name.toLowerCase().replaceAll(' ', '-');

export function demoConfig(demo: DemoHouse = longHouse): HouseConfig {
  const { house } = demo;
  return {
    house: {
      id: 'house',
      name: house.name,
      zone: house.zone,
      latitude: house.latitude,
      longitude: house.longitude,
      altitude: house.altitude ?? 0,
      frostLimit: house.frostLimit ?? null,
      frostAlarm: house.frostAlarm ?? null,
    },
    points: demo.points.map((one) => ({
      id: `point-${one.key}`,
      key: one.key,
      name: one.name,
      role: one.role,
      unit: one.unit,
      min: one.min ?? null,
      max: one.max ?? null,
      staleAfterS: one.staleAfter ?? null,
      reportEveryS: 30,
      maxRate: one.maxRate ?? null,
      frozenAfterS: one.frozenAfter ?? null,
      sensor: one.sensor ?? null,
      derived: null,
    })),
    sources: demo.sources.map((one) => ({
      id: `source-${one.name}`,
      slug: slugOf(one.name),
      name: one.name,
      kind: one.kind,
      corePoint: one.corePoint ?? null,
      basePoint: one.basePoint ?? null,
      coreFloor: one.coreFloor ?? null,
      dailyLimitS: one.dailyLimit ?? null,
      ready: one.ready ? { level: one.ready.level, forS: one.ready.for } : null,
    })),
    loops: [],
    channels: demo.channels.map((one) => ({
      id: `channel-${one.key}`,
      number: one.number,
      key: one.key,
      label: one.label,
      node: one.node,
      relay: one.relay,
      source: one.source ?? null,
      frostHelp: one.frostHelp ?? false,
      contact: one.contact,
      loadKind: one.load.kind,
      loadW: one.load.watts ?? null,
      minOnS: one.minOn,
      minOffS: one.minOff,
      longestOnS: one.longestOn ?? null,
      highLimit: one.highLimit ?? null,
      runProof: one.runProof ?? null,
    })),
    interlocks: demo.interlocks.map((one, index) => ({
      id: `interlock-${index}`,
      channel: one.channel,
      kind: one.kind,
      other: one.other,
      delayS: one.delay ?? 0,
      frostMayBreak: one.frostMayBreak ?? false,
    })),
    rules: demo.rules.map((one, index) => ({
      id: `rule-${index}`,
      name: one.name,
      channel: one.channel,
      versionId: `version-${index}`,
      version: 1,
      body: RuleBody.parse(one.body),
    })),
  };
}

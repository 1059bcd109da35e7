import type { Scene } from '@/lib/wording/scene';
import { USUAL } from '@/lib/units/preferences';

/** The long house of the demo at a quarter to six of a November morning. */
export const scene: Scene = {
  now: Date.parse('2026-11-27T05:45:00Z'),
  zone: 'Europe/London',
  preferences: USUAL,
  points: [
    { key: 'house-air', name: 'House air', role: 'house-air', unit: 'Cel' },
    { key: 'bench-1', name: 'Bench probe 1', role: 'bench', unit: 'Cel' },
    { key: 'bench-3', name: 'Bench probe 3', role: 'bench', unit: 'Cel' },
    { key: 'outdoors', name: 'Outdoors', role: 'outdoors', unit: 'Cel' },
    { key: 'gate-core', name: 'Gate heap core', role: 'heap-core', unit: 'Cel' },
    { key: 'gate-base', name: 'Gate heap beside the pipe', role: 'heap-base', unit: 'Cel' },
  ],
  channels: [
    { key: 'gate-heap-fan', label: 'Gate-heap fan', loadKind: 'motor' },
    { key: 'ground-fan', label: 'Ground fan', loadKind: 'motor' },
    { key: 'ridge-vent', label: 'Ridge vent', loadKind: 'vent' },
  ],
  sources: [{ slug: 'gate-heap', name: 'Gate heap' }],
};

export const american: Scene = {
  ...scene,
  preferences: { temperature: 'F', clock: 12, flow: 'cfm', length: 'ft' },
};

/** Epoch ms of a time of that night. */
export const at = (time: string) => Date.parse(`2026-11-${time > '12:00' ? '26' : '27'}T${time}:00Z`);

/** Figures and units are kept together by a no-break space. */
export const spaced = (text: string) => text.replaceAll('\u00a0', ' ');

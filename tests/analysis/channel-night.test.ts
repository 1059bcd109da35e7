import { describe, expect, it } from 'vitest';
import { houseNight } from '@/lib/analysis/house-night';
import { summarise } from '@/lib/analysis/summarise';
import { after, minute, night, scene, series } from './scene';

/** The scene's fan with a clamp on its supply, which shows 0.5 A while `runs` says so. */
function proved(runs: (minutes: number) => boolean | null, every = 1) {
  const input = scene();
  const [fan] = input.channels;
  if (fan === undefined) throw new Error('the scene has a fan');
  const amps = series('fan-amps', 'current', (m) => {
    const on = m % every === 0 ? runs(m) : null;
    return on === null ? null : on ? 0.5 : 0;
  });
  return {
    ...input,
    channels: [{ ...fan, runProof: { point: 'fan-amps', above: 0.2 } }],
    points: new Map(input.points).set('fan-amps', { ...amps, holdS: every * 180 }),
  };
}
const draws = (m: number) => (m >= 600 && m < 640) || (m >= 680 && m < 720);
const unproved = summarise(scene());

describe('heat and the proof that the fan runs', () => {
  it('is the same with a proof as without, and only without it is it marked as supposed', () => {
    const whole = summarise(proved(draws));
    expect(whole.heat).toEqual({ ...unproved.heat, assumedRunning: false });
    expect(unproved.heat?.assumedRunning).toBe(true);
  });

  it('does not lose the time from the start to the first reading of the proof', () => {
    // the reading at the very start still shows the fan standing
    const lagging = summarise(proved((m) => m !== 600 && draws(m)));
    expect(lagging.heat?.kWh).toBe(unproved.heat?.kWh);
    expect(lagging.channels[0]?.standingSeconds).toBe(0);
  });

  it('is not booked while the proof says that the fan stands, though its relay is on', () => {
    const stuck = summarise(proved((m) => draws(m) && m < 690));
    expect(stuck.onSeconds).toBe(4800);
    expect(stuck.channels[0]?.standingSeconds).toBe(30 * 60);
    expect((stuck.heat?.kWh ?? 0) / (unproved.heat?.kWh ?? 1)).toBeCloseTo(50 / 80, 2);
  });

  it('is nothing for a fan that never ran', () => {
    const dead = summarise(proved(() => false));
    expect(dead.heat).toEqual({ kWh: 0, sd: 0, assumedRunning: false });
    expect(dead.channels[0]?.standingSeconds).toBe(4800);
  });

  it('is supposed again while the proof is silent', () => {
    const silent = summarise(proved((m) => (m > 690 ? null : draws(m))));
    expect(silent.heat).toEqual({ ...unproved.heat, assumedRunning: true });
  });
});

describe('the draws of a night', () => {
  it('are told one by one, with the heat of each', () => {
    expect(unproved.draws.map(({ from, to }) => [from, to])).toEqual([
      [after(600), after(640)],
      [after(680), after(720)],
    ]);
    const sum = unproved.draws.reduce((all, draw) => all + (draw.heat?.kWh ?? 0), 0);
    expect(sum).toBeCloseTo(unproved.heat?.kWh ?? 0, 2);
  });

  it('are one where a hand takes over from the band without a stop', () => {
    const input = scene();
    input.channels[0]?.record.decisions.splice(2, 0, { at: after(620), state: 'on', claim: 'hand' });
    const summary = summarise(input);
    expect(summary.draws).toHaveLength(2);
    expect([summary.onSeconds, summary.handSeconds]).toEqual([4800, 1200]);
  });

  it('are uncertain together by no more than one by one', () => {
    const sum = unproved.draws.reduce((all, draw) => all + (draw.heat?.sd ?? 0), 0);
    expect(unproved.heat?.sd).toBeLessThanOrEqual(sum + 0.002);
  });
});

describe('the time of a channel', () => {
  it('that is held is told apart from rest and from what is simply off', () => {
    const input = scene();
    input.channels[0]?.record.decisions.push(
      { at: after(800), state: 'off', claim: 'lock-out' },
      { at: after(860), state: 'off', claim: 'idle' },
    );
    const summary = summarise(input);
    expect([summary.heldSeconds, summary.restSeconds]).toEqual([3600, 4800]);
  });

  it('adds up over channels to that of the source', () => {
    const input = scene();
    const [fan] = input.channels;
    if (fan === undefined) throw new Error('the scene has a fan');
    const two = summarise({ ...input, channels: [fan, { ...fan, number: 2, label: 'Second fan' }] });
    expect(two.channels.map((one) => one.onSeconds)).toEqual([4800, 4800]);
    expect([two.onSeconds, two.dutyOfNight]).toEqual([9600, unproved.dutyOfNight]);
  });
});

it('a kilowatt hour of fan stands against its heat, with the same share of uncertainty', () => {
  const { heat, electricity, heatForPower } = unproved;
  expect(heatForPower?.ratio).toBeCloseTo((heat?.kWh ?? 0) / (electricity?.kWh ?? 1), 2);
  expect((heatForPower?.sd ?? 0) / (heatForPower?.ratio ?? 1)).toBeCloseTo(
    (heat?.sd ?? 0) / (heat?.kWh ?? 1),
    3,
  );
});

describe('a run that was read in part', () => {
  const input = scene();
  // of 80 min of run, the return was read in the first 56
  const points = new Map(input.points).set(
    'loop-return',
    series('loop-return', 'loop-return', (m) => (m <= 696 || m > 720 ? 15 : null)),
  );
  const part = summarise({ ...input, points });

  it('is marked, though the house was read nearly throughout', () => {
    expect(part.coverage).toBeGreaterThan(0.99);
    expect([part.heatMeasured, part.coverageLow]).toEqual([0.7, true]);
    const house = houseNight({ ...input, points, house: { ...input.house, frostAlarmC: null } });
    expect([house.heatMeasured, house.coverageLow]).toEqual([0.7, true]);
  });

  it('has its heat stand against the electricity of what was read, not of all of the run', () => {
    expect(part.electricity?.kWh).toBe(0.016);
    expect(part.heatElectricity?.kWh).toBe(0.0112);
    expect(part.heatForPower?.ratio).toBeCloseTo(unproved.heatForPower?.ratio ?? NaN, 0);
    const house = houseNight({ ...input, points, house: { ...input.house, frostAlarmC: null } });
    expect(house.heatForPower).toEqual(part.heatForPower);
  });

  it('counts the electricity of a fan that stands: of that the heat is known', () => {
    const stuck = summarise(proved((m) => draws(m) && m < 690));
    expect(stuck.heatElectricity).toEqual(stuck.electricity);
    expect(stuck.coverageLow).toBe(false);
  });
});

describe('a night that was read in part', () => {
  const half = (m: number) => m <= 720;
  const input = scene();
  const points = new Map(
    [...input.points].map(([key, one]) => [
      key,
      { ...one, good: one.good.filter(({ at }) => half((at - night.from) / minute)) },
    ]),
  );
  const part = summarise({ ...input, points });

  it('says so', () => {
    expect([part.coverageLow, unproved.coverageLow]).toEqual([true, false]);
  });

  it('does not scale its sums up', () => {
    // both draws end at 12 h, so all of the heat was read, and half of the lift
    expect(part.heat).toEqual(unproved.heat);
    const lift = (from: number, to: number) => {
      let sum = 0;
      for (let m = from; m < to; m += 0.5) sum += (6 + Math.min(m / 100, 8)) / 120;
      return sum;
    };
    expect(unproved.liftDegreeHours).toBeCloseTo(lift(0, 1440), 0);
    expect(part.liftDegreeHours).toBeCloseTo(lift(0, 720), 0);
  });
});

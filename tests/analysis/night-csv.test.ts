import { describe, expect, it } from 'vitest';
import { nightAnswer } from '@/lib/analysis/night-answer';
import { nightsCsv } from '@/lib/analysis/night-csv';
import { summarise } from '@/lib/analysis/summarise';
import { scene } from './scene';

const night = summarise(scene());
const table = (csv: string) => {
  const [heads, row] = csv.split('\r\n').map((line) => line.split(','));
  return Object.fromEntries((heads ?? []).map((head, i) => [head, row?.[i]]));
};

describe('nights as comma-separated values', () => {
  it('say what the interface says', () => {
    const answer = nightAnswer(night, 'Europe/London');
    const told = table(nightsCsv([night], 'Europe/London'));
    expect(told).toMatchObject({
      night: answer.night,
      on_s: String(answer.onSeconds),
      duty_of_night: String(answer.dutyOfNight),
      heat_kWh: String(answer.heat?.kWh),
      lowest_at: answer.lowest?.at,
      coverage: String(answer.coverage),
    });
  });

  it('leave empty what is not known, never zero', () => {
    const unknown = { ...night, heat: null, coreAtDawn: null, belowFrostLimitSeconds: null };
    expect(table(nightsCsv([unknown], 'UTC'))).toMatchObject({
      heat_kWh: '',
      core_at_dawn_C: '',
      below_frost_limit_s: '',
    });
  });

  it('have a row a night, each ended by CR LF', () => {
    expect(nightsCsv([night, night], 'UTC').match(/\r\n/g)).toHaveLength(3);
  });

  it('let no name of a point act as a formula or break its cell', () => {
    const hostile = { point: '=cmd|"x",1', name: 'x', value: 1, at: 0 };
    expect(nightsCsv([{ ...night, lowest: hostile }], 'UTC')).toContain(`"'=cmd|""x"",1"`);
  });
});

/** What the worker counts, for GET /metrics in Prometheus' text format. */

const HELP = {
  readings_stored_total: 'Readings stored.',
  readings_duplicate_total: 'Readings that were there already.',
  readings_commits_total: 'Transactions in which readings were committed.',
  readings_refused_total: 'Records of packs refused, each with its reason.',
  frames_malformed_total: 'Frames of nodes that could not be read.',
  frames_retained_total: 'Messages that a broker had kept: ignored.',
  frames_unsigned_total: 'Messages of a broker that no known node has signed: ignored.',
  commands_sent_total: 'Commands sent to nodes, renewals among them.',
  commands_withheld_total: 'Commands not sent since they would have come too late.',
  takeovers_total: 'Connections that took over from another of the same node.',
  steps_total: 'Steps of the core.',
  steps_failed_total: 'Steps of the core that threw.',
  step_seconds_total: 'Time spent in steps of the core.',
  switchings_total: 'Switchings of loads.',
  writes_failed_total: 'Writes to the database that failed and were tried again.',
  live_dropped_total: 'States not sent to a browser that did not keep up.',
} as const;
export type Counter = keyof typeof HELP;

export interface Gauge {
  help: string;
  read: () => number;
}

export class Metrics {
  private readonly counters = new Map<Counter, number>();
  private readonly gauges = new Map<string, Gauge>();

  add(name: Counter, by = 1): void {
    this.counters.set(name, this.read(name) + by);
  }

  read(name: Counter): number {
    return this.counters.get(name) ?? 0;
  }

  gauge(name: string, help: string, read: () => number): void {
    this.gauges.set(name, { help, read });
  }

  text(): string {
    const lines: string[] = [];
    for (const [name, help] of Object.entries(HELP)) {
      const value = this.counters.get(name as Counter) ?? 0; // a key of HELP is a Counter
      lines.push(
        `# HELP middenward_${name} ${help}`,
        `# TYPE middenward_${name} counter`,
        `middenward_${name} ${value}`,
      );
    }
    for (const [name, { help, read }] of this.gauges) {
      lines.push(
        `# HELP middenward_${name} ${help}`,
        `# TYPE middenward_${name} gauge`,
        `middenward_${name} ${read()}`,
      );
    }
    return `${lines.join('\n')}\n`;
  }
}

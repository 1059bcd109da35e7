/** A program of the test file's own whose clock runs fast, with its owner signed in from outside. */
import { afterAll, beforeAll, expect } from 'vitest';
import { startApp, type RunningApp } from '../support/app';
import { OutsideApi } from '../support/outside-api';
import { Scene } from './contract-scene';

export interface FastProgram {
  readonly app: RunningApp;
  readonly api: OutsideApi;
  /** A house of its own in it. */
  readonly open: (more?: Parameters<typeof Scene.open>[3]) => Promise<Scene>;
}

/**
 * Runs from before the first test of the file that calls this until after its last.
 * @param rate app seconds a real second
 * @param yard the simulated yard runs beside it
 */
export function fastProgram(rate: number, { yard }: { yard: boolean } = { yard: false }): FastProgram {
  let started: { app: RunningApp; api: OutsideApi } | null = null;
  const running = () => {
    if (started === null) throw new Error('the program runs only while the tests of its file do');
    return started;
  };
  let stop: () => unknown = () => undefined;
  beforeAll(async () => {
    const app = await startApp({ yard, rate, seed: { nights: 0 } });
    stop = () => app.stop();
    started = { app, api: await OutsideApi.signIn(app.url, 'owner@larkmoor.example', app.password) };
  }, 120_000);
  afterAll(() => stop());
  return {
    get app() {
      return running().app;
    },
    get api() {
      return running().api;
    },
    open: (more = {}) => Scene.open(running().app, running().api, rate, more),
  };
}

/**
 * Expects a time in app seconds near the one worked out.
 * @param usualSlack a step is taken late by some real milliseconds, each of which is as many of app time as the rate
 */
export function nearWithin(usualSlack: number) {
  return (value: number, wanted: number, slack = usualSlack): void => {
    expect(value, `${value} s, wanted ${wanted} s`).toBeGreaterThan(wanted - slack);
    expect(value, `${value} s, wanted ${wanted} s`).toBeLessThan(wanted + slack);
  };
}

// One running program for all files of the projects "web" and "browser" that are content with it; a file that kills parts,
// or needs holdings untouched by others, calls startApp itself.
import type { TestProject } from 'vitest/node';
import { inject } from 'vitest';
import { startApp, type RunningApp } from './app';
import { makeTemplate } from './cluster';

export interface SharedApp {
  url: string;
  password: string;
  databaseUrl: string;
  ownerUrl: string;
}

declare module 'vitest' {
  export interface ProvidedContext {
    app: SharedApp;
  }
}

/** The shared program, from a test. The yard runs and the demo holdings have a week of history. */
export const sharedApp = (): SharedApp => inject('app');

let started: Promise<RunningApp> | undefined;
let users = 0;

export default async function setup(project: TestProject) {
  users += 1;
  started ??= makeTemplate().then((cluster) => startApp({ yard: true, seed: { nights: 7 } }, cluster));
  const { url, password, databaseUrl, ownerUrl } = await started;
  project.provide('app', { url, password, databaseUrl, ownerUrl });
  return async () => {
    users -= 1;
    if (users === 0 && started !== undefined) await (await started).stop();
  };
}

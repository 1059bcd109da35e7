// A small house of a test's own in the running program, made through the interface, so that no other test's rules move.
import type { Browser, BrowserContext } from 'playwright-core';
import { launchBrowser, signedIn } from './browser';
import { sharedApp } from './shared-app';

export interface OwnHouse {
  slug: string;
  post: (path: string, data: unknown) => Promise<unknown>;
}

let made = 0;

/** @param owner signed in as somebody who may wire */
export async function makeHouse(owner: BrowserContext, origin: string): Promise<OwnHouse> {
  const post = async (path: string, data: unknown): Promise<unknown> => {
    const answer = await owner.request.post(`/api/v1${path}`, { data, headers: { origin } });
    if (!answer.ok()) throw new Error(`${path}: ${answer.status()} ${await answer.text()}`);
    return answer.json();
  };
  made += 1;
  const house = await post('/houses', {
    name: `Trial tunnel ${process.pid} ${made}`,
    zone: 'Europe/London',
    latitude: 54.2,
    longitude: -2.3,
    frostLimit: 3,
    frostAlarm: 2,
  });
  const slug = String((house as { slug: unknown }).slug);
  return { slug, post: (path, data) => post(`/houses/${slug}${path}`, data) };
}

/** A browser with Larkmoor's owner signed in to the shared program, and a house of the owner's that is wired. */
export async function openOwnHouse(): Promise<{ browser: Browser; owner: BrowserContext; house: OwnHouse }> {
  const browser = await launchBrowser();
  const owner = await signedIn(browser, sharedApp(), 'owner@larkmoor.example');
  const house = await makeHouse(owner, sharedApp().url);
  await wireHouse(house);
  return { browser, owner, house };
}

/** A node with one fan on each contact and one probe on the bench; nothing is proved. */
export async function wireHouse({ post }: OwnHouse): Promise<void> {
  await post('/nodes', { key: 'T-1', kind: 'socket', channels: 4 });
  await post('/points', {
    key: 'bench',
    node: 'T-1',
    name: 'Bench',
    role: 'bench',
    unit: 'Cel',
    min: -40,
    max: 85,
  });
  const fan = {
    node: 'T-1',
    load: { kind: 'motor', watts: 12, volts: 24, supply: 'dc' },
    minOn: 60,
    minOff: 60,
  };
  await post('/channels', { ...fan, number: 1, relay: 1, key: 'fan', label: 'Tunnel fan', contact: 'NO' });
  await post('/channels', {
    ...fan,
    number: 2,
    relay: 2,
    key: 'stirrer',
    label: 'Air stirrer',
    contact: 'NC',
  });
}

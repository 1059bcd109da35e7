// Debian's Mosquitto, a broker of MQTT, for the tests of nodes behind one.
import { existsSync } from 'node:fs';
import { installDebian } from './debian.mjs';
import { inPath } from './path.mjs';

// a normal user's PATH may lack the folder of servers
const SBIN = '/usr/sbin/mosquitto';

/** The broker's program, or undefined: what MOSQUITTO names, else the first found. */
export function findMosquitto() {
  return process.env.MOSQUITTO || inPath('mosquitto') || (existsSync(SBIN) ? SBIN : undefined);
}

export function ensureMosquitto() {
  const found = findMosquitto();
  if (found !== undefined) return found;
  installDebian(
    ['mosquitto', 'openssl'],
    'the tests of nodes behind a broker',
    'Or name a broker that you already have: MOSQUITTO=/path/to/mosquitto',
  );
  return findMosquitto();
}

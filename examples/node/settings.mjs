// The settings: one JSON file. Whatever is wrong in it ends the program with a sentence that says what to put.
import { readFileSync } from 'node:fs';
import path from 'node:path';

const KNOWN = [
  ...['server', 'token', 'tokenFile', 'node', 'folder', 'clock', 'backend', 'relays', 'points', 'watchdog'],
  ...['gpioRoot', 'w1Root', 'dryRunPoints'],
];

/** @throws Error with a sentence */
export function readSettings(file) {
  if (file === undefined) throw new Error('Give the settings file: node node.mjs SETTINGS.json');
  const given = json(file);
  const here = (place) => path.resolve(path.dirname(file), place);
  const wrong = (name, should) => {
    throw new Error(`${file}: "${name}" ${should}`);
  };
  for (const name of Object.keys(given))
    if (!KNOWN.includes(name)) wrong(name, `is not known; there are ${KNOWN.join(', ')}`);
  const text = (name, example) =>
    typeof given[name] === 'string' && given[name] !== ''
      ? given[name]
      : wrong(name, `must be a text such as "${example}"`);
  const list = (name, isRight, should) =>
    Array.isArray(given[name]) && given[name].every(isRight) ? given[name] : wrong(name, should);

  const server = text('server', 'wss://greenhouse.example');
  if (!/^wss?:\/\/[^/]/.test(server)) wrong('server', 'must begin with wss:// (or ws:// inside one network)');
  const backend = given.backend ?? 'sysfs';
  if (!['sysfs', 'dry-run'].includes(backend)) wrong('backend', 'is "sysfs" or "dry-run"');
  const clock = given.clock ?? 'machine';
  if (!['machine', 'none'].includes(clock))
    wrong('clock', 'is "machine", or "none" for a board that forgets the time');
  const isRelay = ({ gpio }) => backend === 'dry-run' || (Number.isInteger(gpio) && gpio >= 0);
  const isPoint = ({ key, unit, w1, file: from }) =>
    [key, unit].every((one) => typeof one === 'string') &&
    (backend === 'dry-run' || typeof (w1 ?? from) === 'string');
  const points = list('points', isPoint, 'lists { "key", "unit" } each with "w1": "28-…" or "file"');
  return {
    ...given,
    ...{ server, backend, clock, points },
    token:
      given.tokenFile === undefined
        ? text('token', 'mw_…')
        : readFileSync(here(given.tokenFile), 'utf8').trim(),
    node: text('node', 'LH-1'),
    folder: here(text('folder', 'kept')),
    relays: list(
      'relays',
      isRelay,
      'lists { "gpio": 17, "activeLow": true } in the order of the relay numbers',
    ),
    ...(given.dryRunPoints === undefined ? {} : { dryRunPoints: here(given.dryRunPoints) }),
  };
}

function json(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    throw new Error(`${file} cannot be read as JSON: ${error.message}`, { cause: error });
  }
}

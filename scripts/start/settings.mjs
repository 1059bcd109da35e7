// What `npm start` is told by its environment; a wrong value ends the start by the name of its variable, never its value.
import { dataFolder } from '../places.mjs';
import { CONFIGURATION, Trouble } from '../say.mjs';

const NODE_NEEDED = [20, 19];
export const USUAL_PORT = 3000;
export const SHORTEST_PASSWORD = 15;

export function checkNode(version = process.versions.node) {
  const [major, minor] = version.split('.').map(Number);
  if (major > NODE_NEEDED[0] || (major === NODE_NEEDED[0] && minor >= NODE_NEEDED[1])) return;
  throw new Trouble(`Node ${NODE_NEEDED.join('.')} or newer is needed; this is ${version}.`, CONFIGURATION);
}

/** @param {Record<string, string | undefined>} env */
export function readSettings(env, { usualPort = USUAL_PORT } = {}) {
  const given = (name) => (env[name] === '' ? undefined : env[name]);
  const port = portOf(given, 'PORT');
  const rate = Number(given('CLOCK_RATE') ?? 1);
  if (!(rate >= 0.1 && rate <= 600)) wrong('CLOCK_RATE must be a number from 0.1 to 600 (1 is real time).');
  const password = given('DEMO_PASSWORD');
  if (password !== undefined && password.length < SHORTEST_PASSWORD) {
    wrong(`DEMO_PASSWORD must have at least ${SHORTEST_PASSWORD} characters; leave it out to have one made.`);
  }
  return {
    port: port ?? usualPort,
    portFixed: port !== undefined,
    host: given('HOST'),
    publicUrl: originOf(given('PUBLIC_URL')),
    trustProxy: onOrOff(given, 'TRUST_PROXY', 'off'),
    yard: onOrOff(given, 'YARD', 'on'),
    rate,
    password,
    authSecret: given('AUTH_SECRET'),
    databaseUrl: given('DATABASE_URL'),
    dataDir: dataFolder(given('DATA_DIR') ?? ''),
    webPort: portOf(given, 'WEB_PORT'),
    workerPort: portOf(given, 'WORKER_PORT'),
    mailPort: portOf(given, 'MAIL_PORT'),
  };
}

function portOf(given, name) {
  const text = given(name);
  if (text === undefined) return undefined;
  const port = Number(text);
  if (!Number.isInteger(port) || port < 1 || port > 65_535)
    wrong(`${name} must be a whole number from 1 to 65535.`);
  return port;
}

function onOrOff(given, name, usual) {
  const text = given(name) ?? usual;
  if (text !== 'on' && text !== 'off') wrong(`${name} must be "on" or "off".`);
  return text === 'on';
}

function originOf(text) {
  if (text === undefined) return undefined;
  const url = URL.canParse(text) ? new URL(text) : null;
  if (url === null || !/^https?:$/.test(url.protocol)) {
    wrong('PUBLIC_URL must be the address that browsers use, such as https://nursery.example.');
  }
  return url.origin;
}

function wrong(sentence) {
  throw new Trouble(sentence, CONFIGURATION);
}

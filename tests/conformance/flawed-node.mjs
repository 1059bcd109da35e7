#!/usr/bin/env node
// A small field node that can be given a flaw, to see that the conformance test finds it: node flawed-node.mjs URL TOKEN FLAW
// With the flaw "none" it keeps the duties of a node without a fallback.
import { randomUUID } from 'node:crypto';
import WebSocket from 'ws';

const [url, token, flaw] = process.argv.slice(2);
const RELAYS = 2;
const boot = randomUUID();
const has = (name) => flaw === name;

const state = { coils: ['off', 'off'], number: 0, trips: 0, seq: 0, rate: 1, reportS: 30 };
if (has('coil-on-at-start')) state.coils[0] = 'on';
let backlog = [];
let sentAt = new Map();
let socket;
let isWelcome = false;
let leaseTimer;
let relaysTimer;
let sampleTimer;

let anchor = { app: Date.now() / 1000, mono: performance.now() };
const appNow = () =>
  anchor.app + ((performance.now() - anchor.mono) / 1000) * (has('own-clock') ? 1 : state.rate);
const realMs = (seconds) => (seconds * 1000) / state.rate;

function send(frame) {
  if (socket?.readyState !== WebSocket.OPEN || !(isWelcome || has('speaks-first'))) return null;
  state.seq += 1;
  socket.send(JSON.stringify({ ...frame, seq: state.seq }));
  return state.seq;
}

function sendRelays() {
  const channels = Object.fromEntries(state.coils.map((coil, at) => [at + 1, coil]));
  const at = performance.now();
  const seq = send({ type: 'relays', channels, number: state.number, trips: state.trips });
  if (seq !== null) sentAt.set(seq, at);
  clearTimeout(relaysTimer);
  relaysTimer = setTimeout(sendRelays, realMs(10));
}

function command(frame) {
  const seenAt = sentAt.get(frame.seen);
  if (frame.boot !== boot && !has('any-boot')) return;
  if (seenAt === undefined && !has('any-seen')) return;
  const isLower = has('numbers-of-32-bits')
    ? frame.number >>> 0 < state.number >>> 0
    : frame.number < state.number;
  if (isLower && !has('lower-number')) return;
  const from = has('lease-from-arrival') || seenAt === undefined ? performance.now() : seenAt;
  const leftMs = from + realMs(frame.lease) - performance.now();
  if (leftMs <= 0) return;
  const wanted = Array.from(
    { length: RELAYS },
    (_, at) => frame.channels[at + 1] ?? (has('keeps-unnamed') ? state.coils[at] : 'off'),
  );
  const isNews = frame.number !== state.number || wanted.join() !== state.coils.join();
  Object.assign(state, { number: frame.number, coils: wanted });
  clearTimeout(leaseTimer);
  if (wanted.includes('on') && !has('no-lease')) leaseTimer = setTimeout(trip, leftMs);
  if (isNews) sendRelays();
}

function trip() {
  state.coils.fill('off');
  if (!has('no-trips')) state.trips += 1;
  sendRelays();
}

function sample() {
  const t = Math.floor(appNow());
  if (has('keeps-12-hours')) backlog = backlog.filter(({ record }) => record.t > t - 43_200);
  backlog.push({ record: { n: 'bench-1', u: 'Cel', v: 4 + (t % 7) / 10, t }, seq: null });
  sampleTimer = setTimeout(sample, realMs(state.reportS));
  sendReadings();
}

/** The next of the old ones, when all that is under way has been acknowledged. */
function sendMore() {
  if (backlog.some(({ seq }) => seq !== null)) return;
  const entries = backlog.slice(0, 100);
  if (entries.length === 0) return;
  const seq = send({ type: 'readings', pack: entries.map(({ record }) => record) });
  for (const entry of entries) entry.seq = seq;
}

function sendReadings() {
  if (!isWelcome) return;
  const waiting = backlog.filter(({ seq }) => seq === null);
  const newest = waiting.slice(-1);
  for (const entries of has('oldest-first')
    ? [waiting.slice(0, 3), newest]
    : [newest, waiting.slice(0, -1).slice(0, 100)]) {
    if (entries.length === 0) continue;
    const seq = send({ type: 'readings', pack: entries.map(({ record }) => record) });
    if (seq === null) return;
    for (const entry of entries) entry.seq = seq;
    if (has('loses-unacknowledged')) backlog = backlog.filter((entry) => entry.seq !== seq);
  }
}

function greet() {
  if (has('speaks-first')) send({ type: 'relays', channels: {}, number: 0, trips: 0 });
  const hello = {
    type: 'hello',
    node: 'flawed',
    firmware: `flaw ${flaw}`,
    channels: RELAYS,
    boot,
    clock: Date.now() / 1000,
  };
  socket.send(JSON.stringify(hello));
}

function dial() {
  socket = new WebSocket(new URL('/field/v1', url), { headers: { authorization: `Bearer ${token}` } });
  socket.on('open', greet);
  socket.on('error', () => undefined);
  socket.on('message', (data) => {
    let frame;
    try {
      frame = JSON.parse(data.toString());
    } catch {
      return;
    }
    if (frame.type === 'welcome') {
      Object.assign(state, { rate: frame.rate, reportS: frame.report });
      isWelcome = true;
      if (!has('own-clock')) anchor = { app: frame.now, mono: performance.now() };
      sentAt = has('any-seen') ? sentAt : new Map();
      sendRelays();
      clearTimeout(sampleTimer);
      sample();
    } else if (frame.type === 'command' && typeof frame.channels === 'object') command(frame);
    else if (frame.type === 'ack') {
      backlog = backlog.filter(({ seq }) => seq !== frame.seq);
      sendMore();
    }
  });
  socket.on('close', () => {
    isWelcome = false;
    for (const entry of backlog) entry.seq = null;
    if (has('no-back-off')) setTimeout(dial, 20);
    else setTimeout(dial, 1000 + Math.random() * 500);
  });
}

dial();

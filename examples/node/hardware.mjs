// What the node is wired to. A backend has `open()`, `set(relay, coil)`, `get(relay)`, `read(point)` and `close()`; to carry
// another kind of board, write another one and leave the rest of the program as it is.
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';

/** Relays on GPIO lines and sensors in files, both as Linux shows them under /sys. */
export function sysfs({ relays, points, gpioRoot = '/sys/class/gpio', w1Root = '/sys/bus/w1/devices' }) {
  const lineOf = (relay, file) => path.join(gpioRoot, `gpio${relays[relay - 1].gpio}`, file);
  // many boards switch their relay on with a low line
  const level = (relay, coil) => (coil === 'on') !== (relays[relay - 1].activeLow === true);

  async function openLine(relay) {
    if (!existsSync(lineOf(relay, 'value'))) {
      writeFileSync(path.join(gpioRoot, 'export'), String(relays[relay - 1].gpio));
    }
    // the line appears at once, the right to write it a little later
    for (let tries = 20; ; tries -= 1) {
      try {
        // we turn levels over ourselves, since `direction` and `value` do not agree on whose business that is
        writeFileSync(lineOf(relay, 'active_low'), '0');
        // "high" and "low" make it an output that begins at that level: no blink of the coil
        writeFileSync(lineOf(relay, 'direction'), level(relay, 'off') ? 'high' : 'low');
        return;
      } catch (error) {
        if (tries === 0) throw error;
        await pause(50);
      }
    }
  }

  return {
    async open() {
      for (let relay = 1; relay <= relays.length; relay += 1) await openLine(relay);
    },
    set: (relay, coil) => writeFileSync(lineOf(relay, 'value'), level(relay, coil) ? '1' : '0'),
    get(relay) {
      const isHigh = readFileSync(lineOf(relay, 'value'), 'utf8').trim() === '1';
      return isHigh === level(relay, 'on') ? 'on' : 'off';
    },
    /** @returns the value in the point's unit; null where the sensor says nothing */
    async read(key) {
      const point = points.find((one) => one.key === key);
      if (point === undefined) return null;
      try {
        return point.w1 === undefined ? await readNumber(point) : await readW1(path.join(w1Root, point.w1));
      } catch {
        return null; // not there, or its checksum failed
      }
    },
    close: () => undefined,
  };
}

/** Any file that holds a number, such as a humidity cell's under /sys/bus/iio: `times` brings it to the point's unit. */
async function readNumber({ file, times = 1 }) {
  const value = Number((await readFile(file, 'utf8')).trim());
  return Number.isFinite(value) ? Number((value * times).toFixed(6)) : null;
}

/** °C of a one-wire probe. Newer kernels give it in `temperature`, all of them in `w1_slave` behind the word of its checksum. */
async function readW1(device) {
  const plain = await readFile(path.join(device, 'temperature'), 'utf8').catch(() => null);
  if (plain !== null) return plain.trim() === '' ? null : Number(plain) / 1000;
  const [checksum = '', line = ''] = (await readFile(path.join(device, 'w1_slave'), 'utf8')).split('\n');
  const [, milli] = /t=(-?\d+)/.exec(line) ?? [];
  return checksum.endsWith('YES') && milli !== undefined ? Number(milli) / 1000 : null;
}

/** No hardware: points come from a JSON file of values by key, and coils are printed and written beside it. */
export function dryRun({ relays, folder, dryRunPoints }) {
  const coils = relays.map(() => 'off');
  return {
    async open() {
      mkdirSync(folder, { recursive: true });
    },
    set(relay, coil) {
      if (coils[relay - 1] !== coil) console.log(`dry run: relay ${relay} ${coil}`);
      coils[relay - 1] = coil;
      writeFileSync(path.join(folder, 'coils.json'), JSON.stringify(coils));
    },
    get: (relay) => coils[relay - 1],
    async read(key) {
      const values = JSON.parse(await readFile(dryRunPoints, 'utf8').catch(() => '{}'));
      return Number.isFinite(values[key]) ? values[key] : null;
    },
    close: () => undefined,
  };
}

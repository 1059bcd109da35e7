// The form of a node's frames, as docs/field-node.md gives it.

const isText = (value) => typeof value === 'string' && value !== '';
const isCount = (value) => Number.isSafeInteger(value) && value >= 0;
const isBoot = (value) => isText(value) || Number.isInteger(value);
const isCoils = (value) =>
  isObject(value) &&
  Object.entries(value).every(
    ([relay, coil]) => /^[1-9][0-9]{0,3}$/.test(relay) && ['on', 'off'].includes(coil),
  );
const isObject = (value) => typeof value === 'object' && value !== null && !Array.isArray(value);

/** By type: field → whether its value fits. A field with `?` may be left out. */
const FORMS = {
  hello: {
    ...{ node: isText, firmware: (value) => typeof value === 'string', channels: isCount, boot: isBoot },
    clock: (value) => value === null || (typeof value === 'number' && value >= 0),
    'can?': (value) => Array.isArray(value) && value.every(isText),
    'seq?': isCount,
  },
  readings: { seq: isCount, pack: Array.isArray },
  relays: {
    ...{ seq: isCount, channels: isCoils, trips: isCount },
    number: (value) => value === null || isCount(value),
  },
  log: { seq: isCount, level: isText, text: (value) => typeof value === 'string' },
};

/** What of a frame is not as it must be, in words; null where nothing is. */
export function wrongWith(frame) {
  const form = Object.hasOwn(FORMS, String(frame.type)) ? FORMS[frame.type] : undefined;
  if (form === undefined) return `a frame of an unknown type: ${JSON.stringify(frame.type)}`;
  for (const [name, fits] of Object.entries(form)) {
    const field = name.replace('?', '');
    if (name.endsWith('?') && frame[field] === undefined) continue;
    if (!fits(frame[field]))
      return `"${field}" of ${frame.type} is ${JSON.stringify(frame[field])?.slice(0, 80)}`;
  }
  const known = ['type', ...Object.keys(form).map((name) => name.replace('?', ''))];
  const odd = Object.keys(frame).find((name) => !known.includes(name));
  return odd === undefined ? null : `"${odd}" is no field of ${frame.type}`;
}

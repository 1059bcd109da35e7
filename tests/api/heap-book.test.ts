// The heap book by its interface: once however often it is sent, photographs without their place, jobs and their calendar.
import { v7 as uuid } from 'uuid';
import sharp from 'sharp';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Asker } from './asker';
import { errorsOf, itemsOf, newHolding, NOBODY, personOf, type Json } from './asker';
import { furnish, type Furnished } from './furnished';
import { picture } from './picture';
import * as shown from './shown';

let owner: Asker;
let grower: Asker;
let own: Furnished;
const at = '/houses/long-house';
beforeAll(async () => {
  const holding = await newHolding('larkmoor');
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  grower = await personOf(holding, 'grower', 'grower@larkmoor.example');
  own = await furnish(holding, owner);
});

describe('what is sent again under its id', () => {
  it('is an entry that is written once and recorded once', async () => {
    const body = { id: uuid(), source: 'gate-heap', kind: 'fed', text: 'Sent twice.' };
    const first = await grower.ask('POST', `${at}/heap-entries`, body);
    const again = await grower.ask('POST', `${at}/heap-entries`, body);
    expect([first.status, again.status]).toEqual([201, 200]);
    expect(again.text).toBe(first.text);
    const book = itemsOf(await owner.get(`${at}/heap-entries`));
    expect(book.filter((entry) => entry['text'] === 'Sent twice.')).toHaveLength(1);
    const audit = itemsOf(await owner.get('/audit?limit=500')).filter((row) =>
      JSON.stringify(row).includes('Sent twice.'),
    );
    expect(audit).toHaveLength(1);
  });

  it('is a probe round that is written once', async () => {
    const body = { ...shown.round, id: uuid() };
    const statuses = [];
    for (const _ of [1, 2]) statuses.push((await grower.ask('POST', `${at}/probe-sets`, body)).status);
    expect(statuses).toEqual([201, 200]);
    const rounds = itemsOf(await owner.get(`${at}/probe-sets?source=gate-heap`));
    expect(rounds.filter((round) => round['id'] === body.id)).toHaveLength(1);
  });

  it('is a photograph that is kept once', async () => {
    const id = uuid();
    const path = `${at}/heap-entries/${own.ids['entry'] ?? ''}/photographs?id=${id}`;
    const bytes = await picture();
    const statuses = [];
    for (const _ of [1, 2]) statuses.push((await grower.ask('POST', path, bytes)).status);
    expect(statuses).toEqual([201, 200]);
  });

  it('is refused where the id is that of an entry in another house', async () => {
    await owner.make('/houses', { ...shown.house, name: 'Prop house' });
    await owner.make('/houses/prop-house/sources', { name: 'Yew heap', kind: 'heap' });
    const body = { id: own.ids['entry'], source: 'yew-heap', kind: 'note', text: 'x' };
    const told = await owner.ask('POST', '/houses/prop-house/heap-entries', body);
    expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, 'id']);
  });
});

describe('a photograph', () => {
  const send = (bytes: unknown) =>
    owner.ask('POST', `${at}/heap-entries/${own.ids['entry'] ?? ''}/photographs`, bytes);
  const bytesOf = async (path: string) => {
    const { GET } = await import('@/app/api/v1/houses/[house]/photographs/[photograph]/route');
    const id = path.split('/').at(-1)?.split('?')[0] ?? '';
    const request = new Request(`http://localhost:3000/api/v1${path}`, { headers: owner.headers });
    const answer = await GET(request, { params: Promise.resolve({ house: 'long-house', photograph: id }) });
    return { answer, bytes: Buffer.from(await answer.arrayBuffer()) };
  };

  it.each(['jpeg', 'png', 'webp'] as const)(
    'of %s is made anew as JPEG without place or camera',
    async (format) => {
      const sent = await picture(format, 3000);
      expect(Buffer.from(sent).includes('Camera of Larkmoor')).toBe(true);
      const made = await send(sent);
      expect(made).toMatchObject({ status: 201, body: { width: 2000, height: 320 } });
      const { answer, bytes } = await bytesOf(`${at}/photographs/${String(made.body['id'])}`);
      expect(Object.fromEntries(answer.headers)).toMatchObject({
        'content-type': 'image/jpeg',
        'cache-control': 'no-store',
        'content-disposition': 'inline',
      });
      const read = await sharp(bytes).metadata();
      expect([read.format, read.exif, read.xmp, read.iptc]).toEqual([
        'jpeg',
        undefined,
        undefined,
        undefined,
      ]);
      expect(bytes.includes('Larkmoor')).toBe(false);
    },
  );

  it('is served small too', async () => {
    const { bytes } = await bytesOf(`${at}/photographs/${own.ids['photograph'] ?? ''}?size=thumbnail`);
    expect((await sharp(bytes).metadata()).width).toBe(320);
  });

  it('stands upright where the file says it lies on its side', async () => {
    const side = await sharp({ create: { width: 400, height: 200, channels: 3, background: '#456' } })
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer();
    expect((await send(side)).body).toMatchObject({ width: 200, height: 400 });
  });

  it.each([
    ['a text', () => Buffer.from('I am no picture')],
    ['an SVG', () => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script>1</script></svg>')],
    ['a GIF', () => Buffer.from('GIF89a\x01\x00\x01\x00\x00\x00\x00;', 'latin1')],
    ['a JPEG that is cut off', async () => Buffer.from(await picture()).subarray(0, 300)],
    ['a PNG’s beginning before something else', () => Buffer.from('\x89PNG\r\n\x1a\nnothing', 'latin1')],
    ['nothing', () => Buffer.alloc(0)],
  ])('%s is refused', async (_, bytes) => expect((await send(await bytes())).status).toBe(422));

  it('over 10 MiB is refused before it is looked at', async () => {
    const large = Buffer.concat([Buffer.from(await picture()), Buffer.alloc(10 * 1024 ** 2)]);
    expect((await send(large)).status).toBe(413);
  });

  it('of an entry is told with it, and gone once it is taken out', async () => {
    const entry = await owner.make(`${at}/heap-entries`, { source: 'gate-heap', kind: 'note' });
    const path = `${at}/heap-entries/${String(entry['id'])}`;
    const made = await owner.ask('POST', `${path}/photographs`, await picture());
    expect((await owner.get(path)).body['photographs']).toMatchObject([{ id: made.body['id'], width: 640 }]);
    const gone = await owner.ask('DELETE', `${at}/photographs/${String(made.body['id'])}`);
    expect(gone.status).toBe(204);
    expect((await owner.get(path)).body['photographs']).toEqual([]);
  });
});

describe('a probe round', () => {
  it.each([
    ['a place outside the section', { places: [{ column: 4, row: 0, celsius: 20 }] }, 'places.0'],
    ['one place twice', { places: [shown.round.places[0], shown.round.places[0]] }, 'places.1'],
    ['no place', { places: [] }, 'places'],
  ])('with %s is refused at its path', async (_, change, path) => {
    const told = await owner.ask('POST', `${at}/probe-sets`, { ...shown.round, ...change });
    expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, path]);
  });

  it('is amended as a whole, and says by whom', async () => {
    const { source: _, at: __, ...rest } = shown.round;
    const path = `${at}/probe-sets/${own.ids['round'] ?? ''}`;
    const told = await grower.ask('PATCH', path, { ...rest, text: 'Read again.' });
    expect(told.body).toMatchObject({ text: 'Read again.', amendedBy: 'grower@larkmoor.example' });
  });
});

describe('a finding', () => {
  it('is set aside with a reason, shown so, and comes back when that is taken back', async () => {
    await grower.make(`${at}/heap-entries`, { source: 'gate-heap', kind: 'note', squeeze: 'crumbles' });
    const list = async () => itemsOf(await owner.get(`${at}/heap-findings?source=gate-heap`));
    const dry = (await list()).find((one) => one['kind'] === 'dry');
    expect(dry).toMatchObject({ sure: 'seen', dismissed: null });
    const { kind, mark, level } = dry ?? {};
    const set = { source: 'gate-heap', kind, mark, level, why: 'Watered already.' };
    const made = await grower.make(`${at}/heap-dismissals`, set);
    const dismissed = { by: 'grower@larkmoor.example', why: 'Watered already.' };
    expect((await list()).find((one) => one['kind'] === 'dry')).toMatchObject({ dismissed });
    await grower.make(`${at}/heap-entries`, { source: 'gate-heap', kind: 'note', squeeze: 'crumbles' });
    expect((await list()).find((one) => one['kind'] === 'dry')?.['dismissed']).toBeNull();
    expect((await owner.ask('DELETE', `${at}/heap-dismissals/${String(made['id'])}`)).status).toBe(204);
  });

  it('is not set aside without a reason', async () => {
    const set = { source: 'gate-heap', kind: 'dry', mark: 'x', level: 1, why: ' ' };
    const told = await owner.ask('POST', `${at}/heap-dismissals`, set);
    expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, 'why']);
  });
});

describe('a material of one’s own', () => {
  it('has a name that no other has, whatever its letters’ size', async () => {
    const told = await owner.ask('POST', '/materials', { ...shown.material, name: 'GATE STABLE bedding' });
    expect(told.status).toBe(409);
  });

  it('is amended in one figure, the others kept', async () => {
    const told = await owner.ask('PATCH', `/materials/${own.ids['material'] ?? ''}`, { moisture: 0.7 });
    expect(told.body).toMatchObject({ ...shown.material, moisture: 0.7 });
  });
});

describe('a job', () => {
  it('keeps who ticked an item, and who finished it', async () => {
    const checklist = [{ text: 'Cover on' }, { text: 'Feed under cover', done: true }];
    const job = {
      source: 'gate-heap',
      kind: 'first-frost',
      title: 'First frost',
      dueOn: '2027-10-10',
      checklist,
    };
    const made = await owner.make(`${at}/heap-jobs`, job);
    const path = `${at}/heap-jobs/${String(made['id'])}`;
    const ticked = [
      { text: 'Cover on', done: true },
      { text: 'Feed under cover', done: true },
    ];
    const told = await grower.ask('PATCH', path, { checklist: ticked, done: true });
    expect(told.body).toMatchObject({
      checklist: [{ doneBy: 'grower@larkmoor.example' }, { doneBy: 'owner@larkmoor.example' }],
      doneBy: 'grower@larkmoor.example',
    });
  });
});

describe('a calendar link', () => {
  const feedOf = (made: Json) => String(made['address']).split('/api/v1')[1] ?? '';

  it('shows the jobs to whoever has its address, signed in or not', async () => {
    const told = await NOBODY.get(feedOf(await grower.make('/calendar-links', {})));
    expect([told.status, told.headers.get('content-type')]).toEqual([200, 'text/calendar; charset=utf-8']);
    expect(told.text).toContain('SUMMARY:Build (Gate heap)');
  });

  it('shows nothing once it is ended, and is nobody else’s to end', async () => {
    const made = await grower.make('/calendar-links', {});
    const path = `/calendar-links/${String(made['id'])}`;
    expect((await owner.ask('DELETE', path)).status).toBe(404);
    expect((await NOBODY.get(feedOf(made))).status).toBe(200);
    expect((await grower.ask('DELETE', path)).status).toBe(204);
    expect((await NOBODY.get(feedOf(made))).status).toBe(404);
  });

  it('is listed without its secret', async () => {
    const made = await grower.make('/calendar-links', {});
    const secret = feedOf(made).replace('/calendar/', '').replace('.ics', '');
    expect((await grower.get('/calendar-links')).text).not.toContain(secret);
    expect((await owner.get('/audit?limit=500')).text).not.toContain(secret);
  });

  it('ends when its person leaves the holding', async () => {
    const feed = feedOf(await grower.make('/calendar-links', {}));
    const people = itemsOf(await owner.get('/people'));
    const id = String(people.find((one) => one['email'] === 'grower@larkmoor.example')?.['id']);
    expect((await owner.ask('DELETE', `/people/${id}`)).status).toBe(204);
    expect((await NOBODY.get(feed)).status).toBe(404);
  });
});

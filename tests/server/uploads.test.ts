import { randomUUID } from 'node:crypto';
import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import os from 'node:os';
import path from 'node:path';
import { deflateSync } from 'node:zlib';
import sharp, { type Sharp } from 'sharp';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET as list, POST as add } from '@/app/api/jobs/[jobId]/uploads/route';
import { GET as read, PATCH as edit } from '@/app/api/uploads/[uploadId]/route';
import { diskDriver } from '@/lib/server/storage/disk';
import { storage, type StorageDriver } from '@/lib/server/storage/driver';
import { s3Driver } from '@/lib/server/storage/s3';
import { keyOf } from '@/lib/server/uploads/keys';
import { sweepUploads } from '@/lib/server/uploads/sweep-uploads';
import { MOST_PICTURE_BYTES } from '@/lib/shared/uploads';
import { AuditEntry, Job, Upload, sequelize } from '@/models';
import { signedIn, type Browser } from './browser';
import { makeJob, makePerson } from './factories';

type Bytes = Buffer<ArrayBuffer>;
const picture = (width: number, height: number) =>
  sharp({ create: { width, height, channels: 3, background: '#2a4fb0' } });
const toBytes = async (made: Sharp) => Buffer.from(await made.toBuffer());

async function studio() {
  const person = await makePerson();
  const { id: jobId } = await makeJob(person);
  return { person, jobId, browser: await signedIn(person) };
}

const send = (browser: Browser, jobId: string, bytes: Bytes, type = 'image/jpeg', more = '', id: string = randomUUID()) =>
  browser.ask(add, {
    method: 'POST',
    params: { jobId },
    path: `/?id=${id}${more}`,
    raw: bytes,
    headers: { 'content-type': type },
  });

async function bytesOf(browser: Browser, uploadId: string, size = 'large') {
  const response = await browser.open(read, { params: { uploadId }, path: `/?size=${size}` });
  return { status: response.status, headers: response.headers, bytes: Buffer.from(await response.arrayBuffer()) };
}

/** A PNG whose header promises more than its few bytes hold. */
function promisingPng(width: number, height: number): Bytes {
  const crcTable = Array.from({ length: 256 }, (_, n) => {
    for (let k = 0; k < 8; k++) n = n & 1 ? 0xedb88320 ^ (n >>> 1) : n >>> 1;
    return n >>> 0;
  });
  const chunk = (name: string, data: Buffer) => {
    const body = Buffer.concat([Buffer.from(name, 'latin1'), data]);
    let crc = 0xffffffff;
    for (const byte of body) crc = crcTable[(crc ^ byte) & 255]! ^ (crc >>> 8);
    const frame = Buffer.alloc(8);
    frame.writeUInt32BE(data.length, 0);
    frame.writeUInt32BE((crc ^ 0xffffffff) >>> 0, 4);
    return Buffer.concat([frame.subarray(0, 4), body, frame.subarray(4)]);
  };
  const head = Buffer.alloc(13);
  head.writeUInt32BE(width, 0);
  head.writeUInt32BE(height, 4);
  head.set([8, 2, 0, 0, 0], 8);
  const rows = deflateSync(Buffer.alloc(1_000_000));
  return Buffer.from(
    Buffer.concat([
      Buffer.from('\x89PNG\r\n\x1a\n', 'latin1'),
      ...[chunk('IHDR', head), chunk('IDAT', rows), chunk('IEND', Buffer.alloc(0))],
    ]),
  );
}

describe('a picture of a job', () => {
  it.each([
    ['image/jpeg', () => picture(800, 600).jpeg()],
    ['image/png', () => picture(800, 600).png()],
    ['image/webp', () => picture(800, 600).webp()],
  ])('is taken as %s, listed and given back in two sizes', async (type, make) => {
    const { browser, jobId } = await studio();
    const answer = await send(browser, jobId, await toBytes(make()), type, '&subject=board&caption=The%20board%2C%20open');
    expect(answer).toMatchObject({ status: 201, body: { subject: 'board', caption: 'The board, open', width: 800 } });
    const { body } = await browser.ask(list, { params: { jobId } });
    expect(body).toMatchObject({ mayEdit: true, uploads: [{ id: answer.body.id, by: { initials: 'T. B.' } }] });
    const large = await bytesOf(browser, answer.body.id);
    expect([large.status, large.headers.get('content-type')]).toEqual([200, 'image/webp']);
    expect(large.headers.get('x-content-type-options')).toBe('nosniff');
    expect(large.headers.get('cache-control')).toMatch(/^private, max-age=60/);
    expect(large.headers.get('content-security-policy')).toMatch(/^sandbox; default-src 'none'/);
    expect(await sharp(large.bytes).metadata()).toMatchObject({ format: 'webp', width: 800, height: 600 });
    const small = await bytesOf(browser, answer.body.id, 'small');
    expect(await sharp(small.bytes).metadata()).toMatchObject({ format: 'webp', width: 480, height: 360 });
  });

  it('stands upright and keeps no word of where it was taken', async () => {
    const { browser, jobId } = await studio();
    const exif = { IFD0: { Copyright: 'secret words' }, IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1' } };
    const taken = await toBytes(picture(400, 300).jpeg().withExif(exif).withMetadata({ orientation: 6 }));
    expect(taken.includes('secret words')).toBe(true);
    const { body } = await send(browser, jobId, taken);
    expect(body).toMatchObject({ width: 300, height: 400 });
    const { bytes } = await bytesOf(browser, body.id);
    const { exif: kept, orientation, xmp, iptc } = await sharp(bytes).metadata();
    expect([kept, orientation, xmp, iptc]).toEqual([undefined, undefined, undefined, undefined]);
    expect(bytes.includes('secret words')).toBe(false);
  });

  it('is no longer than 3000 points, and lies on white where it let the ground through', async () => {
    const { browser, jobId } = await studio();
    const clear = sharp({ create: { width: 4000, height: 1000, channels: 4, background: { r: 0, g: 0, b: 0, alpha: 0 } } });
    const { body } = await send(browser, jobId, await toBytes(clear.png()), 'image/png');
    expect(body).toMatchObject({ width: 3000, height: 750 });
    const { data } = await sharp((await bytesOf(browser, body.id)).bytes).raw().toBuffer({ resolveWithObject: true });
    expect([data[0], data[1], data[2]]).toEqual([255, 255, 255]);
  });

  it('is stored once when its answer was lost and it is sent again, also at the same time', async () => {
    const { browser, jobId } = await studio();
    const bytes = await toBytes(picture(20, 20).jpeg());
    const id = randomUUID();
    const answers = await Promise.all(Array.from({ length: 4 }, () => send(browser, jobId, bytes, 'image/jpeg', '', id)));
    answers.push(await send(browser, jobId, bytes, 'image/jpeg', '', id));
    expect(answers.map(({ status }) => status)).toEqual(Array(5).fill(201));
    expect(await Upload.count({ where: { jobId } })).toBe(1);
    expect(await AuditEntry.count({ where: { subjectId: id, action: 'upload.add' } })).toBe(1);
    const other = await toBytes(picture(21, 20).jpeg());
    expect((await send(browser, jobId, other, 'image/jpeg', '', id)).status).toBe(409);
  });

  it('is captioned, moved to a room, removed and brought back', async () => {
    const { browser, jobId } = await studio();
    const { body } = await send(browser, jobId, await toBytes(picture(20, 20).jpeg()));
    const change = (patch: object) => browser.ask(edit, { method: 'PATCH', params: { uploadId: body.id }, body: patch });
    expect((await change({ caption: '<script>alert(1)</script>', subject: 'room', place: 'r1' })).body).toMatchObject({
      caption: '<script>alert(1)</script>',
      place: 'r1',
    });
    expect((await change({ subject: 'meter' })).body).toMatchObject({ subject: 'meter', place: null });
    expect((await change({ subject: 'board', place: 'r1' })).status).toBe(400);
    expect((await change({ teamId: randomUUID() })).status).toBe(400);
    expect((await change({ removed: true })).body.removed).toBe(true);
    expect((await browser.ask(list, { params: { jobId } })).body.uploads).toEqual([]);
    expect((await bytesOf(browser, body.id)).status).toBe(200);
    await change({ removed: false });
    expect((await browser.ask(list, { params: { jobId } })).body.uploads).toHaveLength(1);
  });

  it('is not taken or changed in an archived job', async () => {
    const { browser, jobId } = await studio();
    const bytes = await toBytes(picture(20, 20).jpeg());
    const { body } = await send(browser, jobId, bytes);
    await Job.update({ archivedAt: new Date() }, { where: { id: jobId } });
    expect((await send(browser, jobId, bytes)).status).toBe(409);
    const { status } = await browser.ask(edit, { method: 'PATCH', params: { uploadId: body.id }, body: { removed: true } });
    expect(status).toBe(409);
    expect((await bytesOf(browser, body.id)).status).toBe(200);
  });
});

describe('what is no picture', () => {
  const jpeg = () => toBytes(picture(600, 600).jpeg());
  const HOSTILE: [string, string, () => Bytes | Promise<Bytes>, RegExp][] = [
    ['a HEIC picture', 'image/jpeg', () => Buffer.from('\0\0\0\x18ftypheic\0\0\0\0mif1heic', 'latin1'), /HEIC.*JPEG/],
    ['an AVIF picture', 'image/webp', () => Buffer.from('\0\0\0\x18ftypavif\0\0\0\0avifmif1', 'latin1'), /JPEG/],
    ['a drawing with a script', 'image/png', () => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script/></svg>'), /no picture/],
    ['a page', 'image/jpeg', () => Buffer.from('<!doctype html><script>alert(1)</script>'), /no picture/],
    ['a TIFF', 'image/png', () => toBytes(picture(8, 8).tiff()), /no picture/],
    ['a GIF', 'image/png', () => toBytes(picture(8, 8).gif()), /no picture/],
    ['nothing', 'image/png', () => Buffer.alloc(0), /no picture/],
    ['a picture under another name', 'image/png', jpeg, /calls itself png and is jpeg/],
    ['half a picture', 'image/jpeg', async () => (await jpeg()).subarray(0, 700), /damaged/],
    ['noise after the first bytes', 'image/png', async () => Buffer.concat([Buffer.from('\x89PNG\r\n\x1a\n', 'latin1'), Buffer.alloc(4000, 7)]), /damaged/],
    ['a picture of 50,000 by 50,000', 'image/png', () => promisingPng(50_000, 50_000), /million points/],
    ['a picture of 2 by 2 billion', 'image/png', () => promisingPng(2_000_000_000, 2_000_000_000), /damaged|million points/],
  ];

  it.each(HOSTILE)('%s is refused in words, soon, and leaves nothing', async (_, type, make, words) => {
    const { browser, jobId } = await studio();
    const before = process.memoryUsage().rss;
    const began = performance.now();
    const answer = await send(browser, jobId, await make(), type);
    expect(answer).toMatchObject({ status: 400, body: { error: 'invalid' } });
    expect(answer.body.message).toMatch(words);
    expect(performance.now() - began).toBeLessThan(5000);
    expect(process.memoryUsage().rss - before).toBeLessThan(200e6);
    expect(await Upload.count({ where: { jobId } })).toBe(0);
  });

  it('hides nothing behind a picture: what followed it is gone', async () => {
    const { browser, jobId } = await studio();
    const polyglot = Buffer.concat([await jpeg(), Buffer.from('<script>alert(document.domain)</script>PK\x03\x04')]);
    const { body } = await send(browser, jobId, polyglot);
    expect((await bytesOf(browser, body.id)).bytes.includes('alert')).toBe(false);
  });

  it('is refused before it is kept where it is too large, said or not', async () => {
    const { browser, jobId } = await studio();
    expect((await send(browser, jobId, Buffer.alloc(MOST_PICTURE_BYTES + 1))).status).toBe(413);
    let given = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        given += 1_000_000;
        controller.enqueue(new Uint8Array(1_000_000));
      },
    });
    const request = new Request('http://127.0.0.1:3000/?id=' + randomUUID(), {
      method: 'POST',
      body: endless,
      headers: { origin: 'http://127.0.0.1:3000', 'content-type': 'image/jpeg' },
      duplex: 'half',
    } as RequestInit);
    const { withJar } = await import('./jar');
    const answer = await withJar(browser.jar, () => add(request, { params: Promise.resolve({ jobId }) }));
    expect(answer.status).toBe(413);
    expect(given).toBeLessThan(MOST_PICTURE_BYTES + 5_000_000);
  });
});

describe('what lies in the store', () => {
  it('is swept a month after it was removed, and a day after it was cut off; the row goes last', async () => {
    const { browser, jobId, person } = await studio();
    const bytes = await toBytes(picture(20, 20).jpeg());
    const ids = [];
    for (let n = 0; n < 4; n++) ids.push((await send(browser, jobId, bytes)).body.id as string);
    const [kept, removed, old, cut] = ids as [string, string, string, string];
    const days = (n: number) => new Date(Date.now() - n * 86_400_000);
    await Upload.update({ removedAt: days(29) }, { where: { id: removed } });
    await Upload.update({ removedAt: days(31) }, { where: { id: old } });
    await sequelize.query('update uploads set stored_at = null, at = $1 where id = $2', { bind: [days(2), cut] });
    await sweepUploads();
    const rows = await Upload.findAll({ where: { jobId }, order: [['at', 'ASC']] });
    expect(rows.map(({ id }) => id).sort()).toEqual([kept, removed].sort());
    const lies = (id: string) => storage().get(keyOf({ teamId: person.teamId, jobId, id }, 'large'));
    expect(await Promise.all(ids.map(async (id) => (await lies(id)) !== null))).toEqual([true, true, false, false]);
  });

  it('that is lost is said to be missing, not shown as something else', async () => {
    const { browser, jobId, person } = await studio();
    const { body } = await send(browser, jobId, await toBytes(picture(20, 20).jpeg()));
    await storage().remove(keyOf({ teamId: person.teamId, jobId, id: body.id }, 'large'));
    expect((await bytesOf(browser, body.id)).status).toBe(404);
  });
});

describe('the drivers', () => {
  interface S3Server {
    run(): Promise<{ port: number }>;
    close(): Promise<void>;
  }
  const S3rver = createRequire(import.meta.url)('s3rver') as new (options: object) => S3Server;
  const PORT = 20_000 + (process.pid % 20_000);
  let folder: string;
  let server: S3Server;
  const drivers: Record<string, () => StorageDriver> = {
    disk: () => diskDriver(path.join(folder, 'disk')),
    S3: () =>
      s3Driver({
        S3_BUCKET: 'pictures',
        S3_REGION: 'us-east-1',
        S3_ENDPOINT: `http://127.0.0.1:${PORT}`,
        S3_ACCESS_KEY_ID: 'S3RVER',
        S3_SECRET_ACCESS_KEY: 'S3RVER',
      }),
  };
  beforeAll(async () => {
    folder = await mkdtemp(path.join(os.tmpdir(), 'ohmstead-store-'));
    const directory = path.join(folder, 's3');
    server = new S3rver({ port: PORT, address: '127.0.0.1', silent: true, directory, configureBuckets: [{ name: 'pictures' }] });
    await server.run();
  });
  afterAll(async () => {
    await server.close();
    await rm(folder, { recursive: true, force: true });
  });

  it.each(['disk', 'S3'])('%s gives back the same bytes, says what is not there, and forgets', async (name) => {
    const driver = drivers[name]!();
    const bytes = Buffer.from(Array.from({ length: 300_000 }, (_, n) => n % 251));
    const key = 'a1/b2/c3/large.webp';
    expect(await driver.get(key)).toBeNull();
    await driver.put(key, bytes, 'image/webp');
    await driver.put(key, bytes, 'image/webp');
    expect((await driver.get(key))!.equals(bytes)).toBe(true);
    await driver.remove(key);
    await driver.remove(key);
    expect(await driver.get(key)).toBeNull();
  });

  it('disk takes no key that leads out of its folder and leaves no half file', async () => {
    const driver = drivers.disk!();
    for (const key of ['../x.webp', '/etc/x.webp', 'a/../../x.webp', 'a\\x.webp', 'a/.b/x.webp', ''])
      await expect(driver.put(key, Buffer.from('x'), 'image/webp')).rejects.toThrow(/no key/);
    await driver.put('alone/x.webp', Buffer.from('x'), 'image/webp');
    expect(await readdir(path.join(folder, 'disk', 'alone'))).toEqual(['x.webp']);
  });
});

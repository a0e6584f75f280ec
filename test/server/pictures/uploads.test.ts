import { createHash, randomBytes } from 'node:crypto';
import { readdirSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { type DetailedError, Upload } from 'tus-js-client';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Person } from '../../support/app.js';
import { jpegOf, trayed } from '../../support/pictures.js';
import { ServedApp } from '../../support/served.js';

describe('a resumable upload', () => {
  let served: ServedApp;
  let owner: Person;
  let headers: Record<string, string>;
  beforeEach(async () => {
    served = await ServedApp.open({ MAX_UPLOAD_MB: '2' });
    owner = await served.server.addPerson('photographer');
    headers = await served.headers(owner);
  });
  afterEach(() => served.close());

  const endpoint = () => `${served.origin}/api/uploads`;
  const folder = (name: string) => join(served.server.config.dataDir, name);
  const idOf = (url: string | null) => (url ?? '').split('/').pop() ?? '';
  const send = (file: Buffer, more: Partial<ConstructorParameters<typeof Upload>[1]> = {}): Promise<Upload> =>
    new Promise((resolve, reject) => {
      const upload: Upload = new Upload(file, {
        endpoint: endpoint(),
        headers,
        metadata: { filename: 'Tümpel – 1.jpg' },
        retryDelays: null,
        onError: reject,
        onSuccess: () => resolve(upload),
        ...more,
      });
      upload.start();
    });
  const raw = (method: string, path: string, more: Record<string, string> = {}, body?: Buffer) =>
    fetch(`${served.origin}${path}`, {
      method,
      headers: { 'Tus-Resumable': '1.0.0', ...headers, ...more },
      ...(body && { body: new Uint8Array(body) }),
    });
  const begin = async (length: number): Promise<string> => {
    const answer = await raw('POST', '/api/uploads', { 'Upload-Length': String(length) });
    expect(answer.status).toBe(201);
    return idOf(answer.headers.get('location'));
  };
  const OCTETS = { 'Content-Type': 'application/offset+octet-stream' };

  it('becomes the picture of its own id, under the name that it had', async () => {
    const bytes = await jpegOf(500, 400);
    const upload = await send(bytes);
    const browser = await served.server.signIn(owner);
    expect(await trayed(browser, idOf(upload.url))).toMatchObject({
      name: 'Tümpel – 1.jpg',
      state: 'waiting',
      image: null,
    });
    await served.server.app.jobs.drain();
    expect(await trayed(browser, idOf(upload.url))).toMatchObject({ state: 'ready' });
    expect(readdirSync(folder('uploads'))).toEqual([]);
  });

  it('goes on where a broken connection left it, and arrives byte for byte', async () => {
    const bytes = randomBytes(1_500_000);
    let broken: Upload | null = null;
    const url = await new Promise<string>((resolve, reject) => {
      broken = new Upload(bytes, {
        endpoint: endpoint(),
        headers,
        chunkSize: 200_000,
        metadata: { filename: 'noise.jpg' },
        retryDelays: null,
        onError: reject,
        onChunkComplete: (_size, accepted) => {
          if (accepted >= 600_000) void broken?.abort().then(() => resolve(broken?.url ?? ''));
        },
      });
      broken.start();
    });
    const before = await raw('HEAD', `/api/uploads/${idOf(url)}`);
    const offset = Number(before.headers.get('upload-offset'));
    expect(offset).toBeGreaterThanOrEqual(600_000);
    expect(offset).toBeLessThan(bytes.length);
    const sent: number[] = [];
    await send(bytes, { uploadUrl: url, onProgress: (soFar) => sent.push(soFar) });
    expect(Math.min(...sent)).toBeGreaterThanOrEqual(offset); // nothing was sent twice
    const sha = createHash('sha256').update(bytes).digest('hex');
    expect(readdirSync(join(folder('originals'), sha.slice(0, 2)))).toEqual([sha]);
  });

  it('goes on after the connection was cut in the middle of a request', async () => {
    const bytes = await jpegOf(1200, 900);
    const id = await begin(bytes.length);
    const half = Math.floor(bytes.length / 2);
    // says that all of it comes, sends half, and hangs up
    const { connect } = await import('node:net');
    const { port, hostname } = new URL(served.origin);
    await new Promise<void>((resolve) => {
      const socket = connect(Number(port), hostname, () => {
        const lines = Object.entries({
          ...{ Host: 'localhost', ...headers, 'Tus-Resumable': '1.0.0', 'Upload-Offset': '0', ...OCTETS },
          'Content-Length': String(bytes.length),
        }).map(([name, value]) => `${name}: ${value}\r\n`);
        socket.write(`PATCH /api/uploads/${id} HTTP/1.1\r\n${lines.join('')}\r\n`);
        socket.write(bytes.subarray(0, half), () => setTimeout(() => socket.destroy(), 100));
      });
      socket.once('close', () => resolve());
    });
    await send(bytes, { uploadUrl: `${endpoint()}/${id}` });
    await served.server.app.jobs.drain();
    expect(await trayed(await served.server.signIn(owner), id)).toMatchObject({ state: 'ready', bytes: bytes.length });
  });

  it('says so when a part does not begin where the last one ended', async () => {
    const id = await begin(1000);
    const answer = await raw('PATCH', `/api/uploads/${id}`, { 'Upload-Offset': '7', ...OCTETS }, Buffer.alloc(10));
    expect([answer.status, await answer.text()]).toEqual([409, expect.stringContaining('Offset')]);
  });

  it('tells a client that missed the last answer that all has arrived, once', async () => {
    const bytes = await jpegOf(200, 200);
    const id = await begin(bytes.length);
    await raw('PATCH', `/api/uploads/${id}`, { 'Upload-Offset': '0', ...OCTETS }, bytes);
    const asked = await raw('HEAD', `/api/uploads/${id}`);
    expect([asked.status, asked.headers.get('upload-offset'), asked.headers.get('upload-length')]).toEqual([
      200,
      String(bytes.length),
      String(bytes.length),
    ]);
    const again = await send(bytes, { uploadUrl: `${endpoint()}/${id}` }); // the client goes on as it would
    expect(idOf(again.url)).toBe(id);
    const tray = (await (await served.server.signIn(owner)).get('/api/tray')).body as unknown[];
    expect(tray).toHaveLength(1);
  });

  it('that breaks on our side is answered with a problem that tells nothing of the data folder', async () => {
    const id = await begin(9);
    rmSync(folder('originals'), { recursive: true });
    writeFileSync(folder('originals'), 'in the way');
    const answer = await raw(
      'PATCH',
      `/api/uploads/${id}`,
      { ...OCTETS, 'Upload-Offset': '0' },
      Buffer.from('ninebytes'),
    );
    expect(answer.status).toBe(500);
    expect(JSON.parse(await answer.text())).toEqual({ type: '/problems/unexpected', title: 'unexpected', status: 500 });
    // and nothing is lost: it is brought in as soon as that is mended
    rmSync(folder('originals'));
    expect((await raw('HEAD', `/api/uploads/${id}`)).headers.get('upload-offset')).toBe('9');
    const browser = await served.server.signIn(owner);
    expect(await trayed(browser, id)).toMatchObject({ bytes: 9 });
  });

  it('is refused when it is larger than accepted, before any byte is sent', async () => {
    const failure = (await send(Buffer.alloc(2 * 1024 * 1024 + 1)).catch((error: unknown) => error)) as DetailedError;
    expect(failure.originalResponse?.getStatus()).toBe(413);
    expect(JSON.parse(failure.originalResponse?.getBody() ?? '')).toMatchObject({
      type: '/problems/too-large',
      parameters: { mostMegabytes: 2 },
    });
    expect(readdirSync(folder('uploads'))).toEqual([]);
  });

  it('does not grow past its limit when it said no length', async () => {
    const begun = await raw('POST', '/api/uploads', { 'Upload-Defer-Length': '1' });
    const id = idOf(begun.headers.get('location'));
    const answer = await raw(
      'PATCH',
      `/api/uploads/${id}`,
      { 'Upload-Offset': '0', ...OCTETS },
      Buffer.alloc(3 * 1024 * 1024),
    ).catch(() => null);
    expect(answer === null || answer.status >= 400).toBe(true);
  });

  it('is for signed-in people, with the XSRF header', async () => {
    const anonymous = await fetch(endpoint(), { method: 'HEAD', headers: { 'Tus-Resumable': '1.0.0' } });
    expect(anonymous.status).toBe(401);
    const { Cookie = '' } = headers;
    const forged = await fetch(endpoint(), {
      method: 'POST',
      headers: { 'Tus-Resumable': '1.0.0', 'Upload-Length': '9', Cookie },
    });
    expect(forged.status).toBe(403);
    expect(readdirSync(folder('uploads'))).toEqual([]);
  });

  it('exists for nobody but the person who made it', async () => {
    const bytes = await jpegOf(200, 200);
    const unfinished = await begin(bytes.length);
    const finished = idOf((await send(bytes)).url);
    const other = await served.headers(await served.server.addPerson('keeper'));
    for (const id of [unfinished, finished, '../motebook.sqlite', '%2e%2e%2fsession-secret']) {
      for (const [method, more, body] of [
        ['HEAD', {}],
        ['GET', {}],
        ['DELETE', {}],
        ['PATCH', { 'Upload-Offset': '0', ...OCTETS }, bytes],
      ] as const) {
        const answer = await raw(method, `/api/uploads/${id}`, { ...more, ...other }, body);
        expect([method, id, answer.status]).toEqual([method, id, 404]);
      }
    }
    expect((await raw('HEAD', `/api/uploads/${unfinished}`)).headers.get('upload-offset')).toBe('0');
  });

  it('can’t be given to somebody else by what the client says', async () => {
    const other = await served.server.addPerson('photographer');
    const bytes = await jpegOf(100, 100);
    const id = idOf((await send(bytes, { metadata: { filename: '../../etc/passwd', ownerId: other.id } })).url);
    expect(await trayed(await served.server.signIn(owner), id)).toMatchObject({ name: 'passwd' });
    expect((await (await served.server.signIn(other)).get('/api/tray')).body).toEqual([]);
  });

  it('goes when nobody went on with it for a week', async () => {
    const old = await begin(1000);
    const fresh = await begin(1000);
    const long = new Date(served.server.clock.now().getTime() - 8 * 24 * 60 * 60_000);
    const now = served.server.clock.now();
    for (const name of [old, `${old}.json`]) utimesSync(join(folder('uploads'), name), long, long);
    for (const name of [fresh, `${fresh}.json`]) utimesSync(join(folder('uploads'), name), now, now);
    served.server.app.start();
    await served.server.app.stop();
    expect(readdirSync(folder('uploads')).sort()).toEqual([fresh, `${fresh}.json`].sort());
  });
});

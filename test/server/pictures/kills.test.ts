import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Upload } from 'tus-js-client';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openDatabase } from '../../../server/db/database.js';
import { UserTable } from '../../../server/db/users.js';
import { FAIL_POINTS } from '../../../server/fail-points.js';
import { newId } from '../../../server/ids.js';
import { Passwords } from '../../../server/passwords.js';
import { verifyPictures } from '../../support/verify-pictures.js';
import { PASSWORD } from '../../support/app.js';
import { jpegOf } from '../../support/pictures.js';
import { SpawnedServer } from '../../support/spawned.js';

const PHOTOGRAPHER = { id: newId(), email: 'kills@people.example' };

interface Trayed {
  id: string;
  name: string;
  state: string;
  image: { revision: number; renditionWidths: number[] } | null;
}

/** The real server, killed with SIGKILL at a named place, then started again on the same folder. */
describe('a picture on its way in survives a kill', () => {
  let dataDir: string;
  let running: SpawnedServer | null = null;
  beforeEach(async () => {
    dataDir = mkdtempSync(join(tmpdir(), 'motebook-kill-'));
    const db = await openDatabase(dataDir);
    await new UserTable(db).insert({
      ...PHOTOGRAPHER,
      name: 'A photographer',
      role: 'photographer',
      creditLine: 'A photographer',
      defaultLicence: 'by',
      fingertipMm: null,
      portrait: null,
      createdAt: new Date().toISOString(),
      passwordHash: await new Passwords(true).hash(PASSWORD),
    });
    await db.close();
  });
  afterEach(async () => {
    await running?.kill();
    rmSync(dataDir, { recursive: true, force: true });
  });

  const begin = async (origin: string, headers: Record<string, string>, length: number): Promise<string> => {
    const filename = Buffer.from('under the sleepers.jpg').toString('base64');
    const answer = await fetch(`${origin}/api/uploads`, {
      method: 'POST',
      headers: {
        ...headers,
        'Tus-Resumable': '1.0.0',
        'Upload-Length': String(length),
        'Upload-Metadata': `filename ${filename}`,
      },
    });
    return answer.headers.get('location') ?? '';
  };
  const goOn = (origin: string, headers: Record<string, string>, path: string, file: Buffer): Promise<void> =>
    new Promise((resolve, reject) => {
      new Upload(file, {
        uploadUrl: `${origin}${path}`,
        headers,
        retryDelays: null,
        onError: reject,
        onSuccess: () => resolve(),
      }).start();
    });
  const tray = async (origin: string, headers: Record<string, string>): Promise<Trayed[]> =>
    (await (await fetch(`${origin}/api/tray`, { headers })).json()) as Trayed[];
  /** waits until the picture is shown; whatever is shown on the way is whole */
  const shown = async (origin: string, headers: Record<string, string>): Promise<Trayed> => {
    for (;;) {
      const [picture] = await tray(origin, headers);
      if (picture?.image) {
        for (const width of picture.image.renditionWidths) {
          const answer = await fetch(`${origin}/renditions/${picture.id}~${picture.image.revision}/${width}.webp`, {
            headers,
          });
          expect([width, answer.status]).toEqual([width, 200]);
        }
        return picture;
      }
      expect(['waiting', 'working', undefined]).toContain(picture?.state);
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  };

  it.each(FAIL_POINTS)(
    'at %s',
    async (point) => {
      const bytes = await jpegOf(900, 700);
      running = await SpawnedServer.start(dataDir, { FAIL_POINT: point });
      const before = await running.signIn(PHOTOGRAPHER);
      const path = await begin(running.origin, before, bytes.length);
      const acknowledged = await goOn(running.origin, before, path, bytes).then(
        () => true,
        () => false, // the server went before it answered
      );
      expect(await running.ended).toBe('SIGKILL');
      // the intake of a picture begins as soon as it is written down, be the answer out or not
      if (point.startsWith('upload:')) expect(acknowledged).toBe(false);

      running = await SpawnedServer.start(dataDir);
      const after = await running.signIn(PHOTOGRAPHER);
      if (!acknowledged) await goOn(running.origin, after, path, bytes); // as the client does by itself
      const picture = await shown(running.origin, after);
      expect(picture).toMatchObject({ id: path.split('/').pop(), name: 'under the sleepers.jpg', state: 'ready' });
      const original = await fetch(`${running.origin}/api/images/${picture.id}/original`, { headers: after });
      expect(Buffer.compare(Buffer.from(await original.arrayBuffer()), bytes)).toBe(0);
      expect(await tray(running.origin, after)).toHaveLength(1);
      await running.stop();

      const db = await openDatabase(dataDir);
      expect(await verifyPictures(dataDir, db)).toEqual([]);
      await db.close();
      expect(readdirSync(join(dataDir, 'uploads'))).toEqual([]);
    },
    120_000,
  );

  it('in the middle of decoding, whose process then ends too', async () => {
    const bytes = await jpegOf(5000, 4000);
    running = await SpawnedServer.start(dataDir);
    const before = await running.signIn(PHOTOGRAPHER);
    await goOn(running.origin, before, await begin(running.origin, before, bytes.length), bytes);
    while ((await tray(running.origin, before))[0]?.state !== 'working')
      await new Promise((resolve) => setTimeout(resolve, 5));
    await running.kill();
    running = await SpawnedServer.start(dataDir);
    await shown(running.origin, await running.signIn(PHOTOGRAPHER));
    await running.stop();
    const db = await openDatabase(dataDir);
    expect(await verifyPictures(dataDir, db)).toEqual([]);
    await db.close();
  }, 120_000);
});

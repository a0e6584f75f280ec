import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { newId } from '../../../server/ids.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { bringIn, jpegOf, trayed } from '../../support/pictures.js';
import { World } from '../../support/world.js';

interface Scaled {
  currentScale: {
    umPerPxX: number;
    umPerPxY: number;
    relativeUncertainty: number;
    grounds: string;
    provenance: Record<string, unknown>;
  } | null;
}

describe('a picture', () => {
  let server: TestApp;
  let world: World;
  let owner: Person;
  let browser: Browser;
  beforeEach(async () => {
    server = await TestApp.open();
    world = new World(server);
    owner = await server.addPerson('photographer');
    browser = await server.signIn(owner);
  });
  afterEach(() => server.close());

  const scaleBy = (id: string, body: object) => browser.post(`/api/images/${id}/scales`, body);
  const a = { x: 100, y: 100 };
  const b = { x: 500, y: 400 }; // 500 px away

  it('is described by its owner, and by nobody else', async () => {
    const id = await world.image(owner, {
      observationId: await world.observation(await world.find(owner, { visibility: 'public' }), owner),
    });
    const edited = await browser
      .patch(`/api/images/${id}`, {
        title: 'Heads on bark',
        light: 'daylight',
        licence: 'by-sa',
        creditLine: ' I. Waddell ',
      })
      .expect(200);
    expect(edited.body).toMatchObject({
      title: 'Heads on bark',
      light: 'daylight',
      licence: 'by-sa',
      creditLine: 'I. Waddell',
      may: { edit: true, annotate: true },
    });
    const other = await server.signIn(await server.addPerson('editor'));
    await other.patch(`/api/images/${id}`, { title: 'mine' }).expect(403);
    expect((await other.get(`/api/images/${id}`)).body).toMatchObject({
      title: 'Heads on bark',
      may: { edit: false, annotate: true },
    });
    expect((await (await server.visit()).get(`/api/images/${id}`)).body).toMatchObject({
      may: { edit: false, annotate: false },
    });
  });

  it('says what its file was called to its owner alone: such names give places away', async () => {
    const observationId = await world.observation(await world.find(owner, { visibility: 'public' }), owner);
    const id = await world.image(owner, { observationId, originalName: 'behind the third sleeper.jpg' });
    expect((await browser.get(`/api/images/${id}`)).body).toMatchObject({
      originalName: 'behind the third sleeper.jpg',
    });
    const seen = await (await server.visit()).get(`/api/images/${id}`);
    expect(JSON.stringify(seen.body)).not.toContain('sleeper');
  });

  it('stands beside those of its preparation', async () => {
    const observation = await world.observation(await world.find(owner), owner);
    const [slide, other] = [
      await world.preparation(observation, 'slide 1'),
      await world.preparation(observation, 'slide 2'),
    ];
    const [first, second] = [
      await world.image(owner, { observationId: observation, preparationId: slide }),
      await world.image(owner, { observationId: observation, preparationId: slide }),
    ];
    await world.image(owner, { observationId: observation, preparationId: other });
    const field = await world.image(owner, { observationId: observation });
    const siblings = async (id: string) =>
      ((await browser.get(`/api/images/${id}`)).body as { siblings: string[] }).siblings;
    expect(await siblings(second)).toEqual([first, second]);
    expect(await siblings(field)).toEqual([field]);
  });

  it('can’t be laid on a slide of another observation', async () => {
    const find = await world.find(owner);
    const [here, there] = [await world.observation(find, owner), await world.observation(find, owner)];
    const id = await world.image(owner, { observationId: here });
    const answer = await browser
      .patch(`/api/images/${id}`, { preparationId: await world.preparation(there) })
      .expect(422);
    expect(answer.body).toMatchObject({ errors: [{ pointer: '#/preparationId', code: 'other-observation' }] });
    const [inTray, nowhere] = [await world.image(owner), newId()];
    for (const picture of [id, inTray]) {
      const lost = await browser.patch(`/api/images/${picture}`, { preparationId: nowhere }).expect(422);
      expect(lost.body).toMatchObject({ errors: [{ pointer: '#/preparationId', code: 'other-observation' }] });
    }
    const slide = await world.preparation(here);
    expect((await browser.patch(`/api/images/${id}`, { preparationId: slide }).expect(200)).body).toMatchObject({
      preparation: { id: slide },
    });
  });

  it('says what the optics of its setting tell apart', async () => {
    const id = await world.image(owner, { settingId: await world.setting(await world.rig(owner)) });
    // 0.61 · 0.55 µm / 0.65
    expect(((await browser.get(`/api/images/${id}`)).body as { resolutionUm: number }).resolutionUm).toBeCloseTo(
      0.51615,
      5,
    );
  });

  it('says its setting before that is calibrated, and carries the scale as soon as it is', async () => {
    const rig = await world.rig(owner);
    const setting = await world.setting(rig);
    const id = await world.image(owner);
    await browser.patch(`/api/images/${id}`, { settingId: setting }).expect(200);
    const marks = [0, 1, 2, 3, 4].map((index) => ({ at: { x: 100 + 200 * index, y: 300 }, index }));
    const calibration = { imageId: await world.image(owner), marks, spacingUm: 100, toleranceUm: 1.5 };
    const kept = await browser.post(`/api/rigs/${rig}/settings/${setting}/calibrations`, calibration).expect(200);
    expect(kept.body).toMatchObject({ scaledImages: 1 });
    const { currentScale } = (await browser.get(`/api/images/${id}`)).body as Scaled;
    expect(currentScale).toMatchObject({ grounds: 'calibrated', umPerPxX: 0.5 }); // 100 µm over 200 px
    // its scale tells its setting from now on
    const other = await world.setting(rig);
    expect((await browser.patch(`/api/images/${id}`, { settingId: other }).expect(409)).body).toMatchObject({
      type: '/problems/has-scale',
    });
  });

  it('knows no setting of somebody else’s', async () => {
    const id = await world.image(owner);
    const theirs = await world.setting(await world.rig(await server.addPerson('photographer')));
    await browser.patch(`/api/images/${id}`, { settingId: theirs }).expect(404);
  });

  it('is not discarded once it is in a find or a calibration rests upon it', async () => {
    const inFind = await world.image(owner, { observationId: await world.observation(await world.find(owner), owner) });
    expect((await browser.delete(`/api/images/${inFind}`).expect(409)).body).toMatchObject({
      type: '/problems/in-a-find',
    });
    const rig = await world.rig(owner);
    const setting = await world.setting(rig);
    const evidence = await world.image(owner);
    const marks = [0, 1, 2, 3, 4].map((index) => ({ at: { x: 100 + 200 * index, y: 300 }, index }));
    await browser
      .post(`/api/rigs/${rig}/settings/${setting}/calibrations`, {
        imageId: evidence,
        marks,
        spacingUm: 100,
        toleranceUm: 1.5,
      })
      .expect(200);
    expect((await browser.delete(`/api/images/${evidence}`).expect(409)).body).toMatchObject({
      type: '/problems/calibration-evidence',
    });
  });

  it('has no view while it has not been taken in', async () => {
    const id = await world.image(owner, { state: 'working' });
    expect((await browser.get(`/api/images/${id}`).expect(409)).body).toMatchObject({
      type: '/problems/not-ready',
      parameters: { state: 'working' },
    });
    expect((await scaleBy(id, { by: 'nothing' }).expect(409)).body).toMatchObject({ type: '/problems/not-ready' });
  });

  it('is told in the tray to have been brought in before, and into which find', async () => {
    const bytes = await jpegOf(200, 150);
    const first = await bringIn(server, owner, bytes, 'sunday.jpg');
    const find = await world.find(owner);
    await server.db
      .write('images')
      .where({ id: first })
      .update({ observation_id: await world.observation(find, owner) });
    const second = await bringIn(server, owner, bytes, 'again.jpg');
    const { number } = (await server.db.read('finds').where({ id: find }).first()) as { number: number };
    expect((await trayed(browser, second))['sameAs']).toEqual({
      imageId: first,
      name: 'sunday.jpg',
      findNumber: `CW-${number}`,
    });
  });

  describe('and its scale', () => {
    it('by a reference in the frame: 10 mm over 500 px', async () => {
      const id = await world.image(owner);
      const { currentScale } = (
        await scaleBy(id, { by: 'reference', a, b, objectId: null, lengthUm: 10_000, toleranceUm: 50 }).expect(200)
      ).body as Scaled;
      expect(currentScale).toMatchObject({
        grounds: 'referenced',
        umPerPxX: 20,
        umPerPxY: 20,
        provenance: { by: 'reference', lengthUm: 10_000, toleranceUm: 50 },
      });
      // √((50/10000/√3)² + (√2·0.5/500)²)
      expect(currentScale?.relativeUncertainty).toBeCloseTo(0.0032146, 6);
    });

    it('by an object of known size takes that size, whatever else is said', async () => {
      const id = await world.image(owner);
      const { currentScale } = (
        await scaleBy(id, { by: 'reference', a, b, objectId: 'euro-0.05', lengthUm: 1 }).expect(200)
      ).body as Scaled;
      expect(currentScale).toMatchObject({
        umPerPxX: 42.5,
        provenance: { objectId: 'euro-0.05', lengthUm: 21_250, toleranceUm: 100 },
      });
    });

    it('by a ruler needs the length that was marked', async () => {
      const id = await world.image(owner);
      const answer = await scaleBy(id, { by: 'reference', a, b, objectId: 'ruler-plastic' }).expect(422);
      expect(answer.body).toMatchObject({ errors: [{ pointer: '#/lengthUm', code: 'missing' }] });
      await scaleBy(id, { by: 'reference', a, b, objectId: 'a horse', lengthUm: 1 }).expect(422);
    });

    it('by a finger uses one’s own when it is known, else a cautious breadth', async () => {
      const id = await world.image(owner);
      const unknown = (await scaleBy(id, { by: 'finger', a, b }).expect(200)).body as Scaled;
      expect(unknown.currentScale).toMatchObject({
        grounds: 'estimated',
        umPerPxX: 33.5,
        provenance: { own: false, breadthMm: 16.75 },
      });
      await server.db.write('users').where({ id: owner.id }).update({ fingertip_mm: 15 });
      const own = (await scaleBy(id, { by: 'finger', a, b }).expect(200)).body as Scaled;
      expect(own.currentScale).toMatchObject({
        grounds: 'estimated',
        umPerPxX: 30,
        provenance: { own: true, breadthMm: 15 },
      });
      expect(own.currentScale!.relativeUncertainty).toBeLessThan(unknown.currentScale!.relativeUncertainty);
    });

    it('by optics is estimated, and by nothing is none', async () => {
      const id = await world.image(owner);
      const optics = { by: 'optics', pixelPitchUm: 3.45, magnification: 40, relay: 0.5, binning: 2 };
      expect(((await scaleBy(id, optics).expect(200)).body as Scaled).currentScale).toMatchObject({
        grounds: 'estimated',
        umPerPxX: expect.closeTo(0.345, 12) as number,
      });
      expect(((await scaleBy(id, { by: 'nothing' }).expect(200)).body as Scaled).currentScale).toMatchObject({
        grounds: 'none',
        umPerPxX: null,
      });
    });

    it.each([
      { by: 'optics', pixelPitchUm: 1e300, magnification: 1e-300, relay: 1, binning: 1 },
      { by: 'reference', a, b, objectId: null, lengthUm: 1e300, toleranceUm: 0 },
      { by: 'reference', a, b, objectId: null, lengthUm: 1000, toleranceUm: 1e300 },
    ])('refuses numbers of which nothing finite can come: %j', async (scale) => {
      const id = await world.image(owner);
      expect((await scaleBy(id, scale).expect(422)).body).toMatchObject({ type: '/problems/invalid' });
      expect((await browser.get(`/api/images/${id}`)).body).toMatchObject({ currentScale: null });
    });

    it('keeps every version, newest first, with who set it', async () => {
      const id = await world.image(owner);
      await scaleBy(id, { by: 'nothing' }).expect(200);
      await scaleBy(id, { by: 'finger', a, b }).expect(200);
      const history = (await browser.get(`/api/images/${id}/scales`).expect(200)).body as object[];
      expect(history).toMatchObject([{ grounds: 'estimated', setBy: { id: owner.id } }, { grounds: 'none' }]);
    });

    it('is refused when its ends lie outside the picture or too near', async () => {
      const id = await world.image(owner, { width: 400, height: 300 });
      expect((await scaleBy(id, { by: 'finger', a, b }).expect(422)).body).toMatchObject({
        errors: [{ pointer: '#/b', code: 'outside-the-picture' }],
      });
      expect((await scaleBy(id, { by: 'finger', a, b: { x: 104, y: 103 } }).expect(422)).body).toMatchObject({
        type: '/problems/reference-too-short',
      });
    });

    describe('by a calibrated setting', () => {
      /** calibrated on a frame of 1200 × 800 px: 100 µm in 200 px */
      const calibrated = async (): Promise<string> => {
        const rig = await world.rig(owner);
        const setting = await world.setting(rig);
        const marks = [0, 1, 2, 3, 4, 5].map((index) => ({ at: { x: 100 + 200 * index, y: 300 }, index }));
        const imageId = await world.image(owner, { width: 1200, height: 800 });
        await browser
          .post(`/api/rigs/${rig}/settings/${setting}/calibrations`, {
            imageId,
            marks,
            spacingUm: 100,
            toleranceUm: 1.5,
          })
          .expect(200);
        return setting;
      };

      it('takes a picture of the frame’s own size as it is', async () => {
        const settingId = await calibrated();
        const id = await world.image(owner, { width: 1200, height: 800 });
        const view = (await scaleBy(id, { by: 'setting', settingId }).expect(200)).body as Scaled & {
          settingId: string;
        };
        expect(view.settingId).toBe(settingId);
        expect(view.currentScale).toMatchObject({
          grounds: 'calibrated',
          provenance: { by: 'calibration', reducedBy: 1, graduations: 6, spanUm: 500, toleranceUm: 1.5 },
        });
        expect(view.currentScale?.umPerPxX).toBeCloseTo(0.5, 9);
      });

      it('takes a picture of the frame on its side, with x and y exchanged', async () => {
        const settingId = await calibrated();
        await server.db.write('calibrations').update({ um_per_px_x: 0.5, um_per_px_y: 0.51 });
        const id = await world.image(owner, { width: 800, height: 1200 });
        const { currentScale } = (await scaleBy(id, { by: 'setting', settingId }).expect(200)).body as Scaled;
        expect(currentScale).toMatchObject({ umPerPxX: 0.51, umPerPxY: 0.5, provenance: { reducedBy: 1 } });
      });

      it('asks whether another size was reduced or cropped, and believes the answer', async () => {
        const settingId = await calibrated();
        const id = await world.image(owner, { width: 600, height: 400 });
        expect((await scaleBy(id, { by: 'setting', settingId }).expect(409)).body).toMatchObject({
          type: '/problems/reduced-or-cropped',
          parameters: { width: 600, height: 400, frameWidth: 1200, frameHeight: 800 },
        });
        expect((await browser.get(`/api/images/${id}`)).body).toMatchObject({ currentScale: null });
        const reduced = (await scaleBy(id, { by: 'setting', settingId, sizeAnswer: 'reduced' }).expect(200))
          .body as Scaled;
        expect(reduced.currentScale?.umPerPxX).toBeCloseTo(1, 9);
        expect(reduced.currentScale?.provenance).toMatchObject({ reducedBy: 2 });
        const cropped = (await scaleBy(id, { by: 'setting', settingId, sizeAnswer: 'cropped' }).expect(200))
          .body as Scaled;
        expect(cropped.currentScale?.umPerPxX).toBeCloseTo(0.5, 9);
      });

      it.each([
        ['reduced', { width: 600, height: 500 }, 'other-aspect'],
        ['reduced', { width: 2400, height: 1600 }, 'larger-than-frame'],
        ['cropped', { width: 1201, height: 300 }, 'larger-than-frame'],
      ])('does not believe that a picture was %s to %o', async (sizeAnswer, size, code) => {
        const settingId = await calibrated();
        const id = await world.image(owner, size);
        const answer = await scaleBy(id, { by: 'setting', settingId, sizeAnswer }).expect(422);
        expect(answer.body).toMatchObject({ errors: [{ pointer: '#/sizeAnswer', code }] });
      });

      it('allows a reduction its rounding to whole pixels', async () => {
        const settingId = await calibrated();
        const id = await world.image(owner, { width: 500, height: 333 }); // 333.3
        const { currentScale } = (await scaleBy(id, { by: 'setting', settingId, sizeAnswer: 'reduced' }).expect(200))
          .body as Scaled;
        expect(currentScale?.umPerPxX).toBeCloseTo(1.2, 9);
        expect(currentScale?.umPerPxY).toBeCloseTo((0.5 * 800) / 333, 9);
      });

      it('is not there for an uncalibrated setting, nor for somebody else’s', async () => {
        const id = await world.image(owner);
        const bare = await world.setting(await world.rig(owner), '10×');
        expect((await scaleBy(id, { by: 'setting', settingId: bare }).expect(409)).body).toMatchObject({
          type: '/problems/no-calibration',
          parameters: { setting: '10×' },
        });
        const theirs = await world.setting(await world.rig(await server.addPerson('photographer')));
        await scaleBy(id, { by: 'setting', settingId: theirs }).expect(404);
      });

      it('of a sitting lapses, but still holds for what was photographed in it', async () => {
        const settingId = await calibrated();
        await server.db.write('calibrations').update({ valid_until: '2026-03-01T21:00:00.000Z' });
        server.clock.pass(24 * 60 * 60_000);
        const later = await world.image(owner, { width: 1200, height: 800 });
        expect((await scaleBy(later, { by: 'setting', settingId }).expect(409)).body).toMatchObject({
          type: '/problems/no-calibration',
        });
        await server.db
          .write('images')
          .where({ id: later })
          .update({ captured_local: '2026-03-01T12:30:00', captured_offset: '+02:00' });
        await scaleBy(later, { by: 'setting', settingId }).expect(200);
      });
    });
  });
});

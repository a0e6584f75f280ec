import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { CalibrationKept, NewCalibration, RigView, SettingView } from '../../../shared/contracts/rigs.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { addPicture } from '../../support/builders/pictures.js';

/** Marks every 100 µm, 50 px apart, along a level line: exactly 2 µm per pixel. */
function marks(count = 11): NewCalibration['marks'] {
  return Array.from({ length: count }, (_, i) => ({ at: { x: 100 + 50 * i, y: 300 }, index: i }));
}

describe('a rig', () => {
  let server: TestApp;
  let owner: Person;
  let browser: Browser;
  let rig: RigView;
  let setting: SettingView;
  let imageId: string;
  beforeEach(async () => {
    server = await TestApp.open();
    owner = await server.addPerson('photographer');
    browser = await server.signIn(owner);
    rig = (await browser.post('/api/rigs', { name: 'Bench', camera: 'C', remarks: '' }).expect(200)).body as RigView;
    setting = await addSetting(false);
    imageId = await addPicture(server, { ownerId: owner.id, width: 800, height: 600 });
  });
  afterEach(() => server.close());

  async function addSetting(oneSitting: boolean): Promise<SettingView> {
    const body = {
      name: '40×',
      objective: '40',
      magnification: 40,
      numericalAperture: 0.65,
      oneSitting,
      captureMode: 'full frame',
    };
    return (await browser.post(`/api/rigs/${rig.id}/settings`, body).expect(200)).body as SettingView;
  }

  function calibrate(wanted: Partial<NewCalibration> = {}, settingId = setting.id) {
    return browser.post(`/api/rigs/${rig.id}/settings/${settingId}/calibrations`, {
      imageId,
      marks: marks(),
      spacingUm: 100,
      toleranceUm: 1.5,
      ...wanted,
    });
  }

  it('fits the marks itself and keeps what it found', async () => {
    const { calibration } = (await calibrate().expect(200)).body as CalibrationKept;
    expect(calibration.umPerPxX).toBeCloseTo(2, 12);
    expect(calibration).toMatchObject({ frameWidth: 800, frameHeight: 600, graduations: 11, validUntil: null });
    expect(calibration.spanUm).toBeCloseTo(1000, 9);
    // 1.5 µm over 1000 µm, rectangular: 0.0015/√3; marks without scatter add the least that pointing can, and no more
    expect(calibration.referenceRelative).toBeCloseTo(0.0015 / Math.sqrt(3), 9);
    expect(calibration.fitRelative).toBeLessThan(2e-4);
    const together = Math.hypot(calibration.referenceRelative, calibration.fitRelative);
    expect(calibration.relativeUncertainty).toBeCloseTo(together, 12);
    const seen = (await browser.get(`/api/rigs/${rig.id}`)).body as RigView;
    expect(seen.settings[0]).toMatchObject({
      calibration: { id: calibration.id },
      history: [{ id: calibration.id }],
      uses: 1,
    });
  });

  it('tells x and y apart by a second ruling', async () => {
    const crossMarks = Array.from({ length: 11 }, (_, i) => ({ at: { x: 400, y: 50 + 40 * i }, index: i }));
    const { calibration } = (await calibrate({ crossMarks }).expect(200)).body as CalibrationKept;
    expect(calibration.umPerPxX).toBeCloseTo(2, 9);
    expect(calibration.umPerPxY).toBeCloseTo(2.5, 9);
  });

  it('gives the scale to its evidence, as a picture of reference, and to pictures that wait, of the same size only', async () => {
    const waiting = await addPicture(server, { ownerId: owner.id, width: 800, height: 600, settingId: setting.id });
    const smaller = await addPicture(server, { ownerId: owner.id, width: 400, height: 300, settingId: setting.id });
    const kept = (await calibrate().expect(200)).body as CalibrationKept;
    expect(kept.scaledImages).toBe(1);
    const scaleOf = async (id: string) =>
      server.db
        .read('images')
        .leftJoin('image_scales', 'image_scales.id', 'images.current_scale_id')
        .where('images.id', id)
        .first('image_scales.grounds', 'image_scales.um_per_px_x', 'images.role', 'images.setting_id') as Promise<
        Record<string, unknown>
      >;
    expect(await scaleOf(imageId)).toMatchObject({ grounds: 'calibrated', role: 'reference', setting_id: setting.id });
    expect(await scaleOf(waiting)).toMatchObject({ grounds: 'calibrated', role: 'subject' });
    expect(await scaleOf(smaller)).toMatchObject({ grounds: null });
  });

  it('keeps the history, the newest first, and never changes a calibration', async () => {
    const first = ((await calibrate()).body as CalibrationKept).calibration;
    server.clock.pass(1000);
    const second = ((await calibrate({ spacingUm: 101 })).body as CalibrationKept).calibration;
    const { settings } = (await browser.get(`/api/rigs/${rig.id}`)).body as RigView;
    expect(settings[0]?.history).toEqual([second, first]);
    expect(settings[0]?.calibration?.id).toBe(second.id);
  });

  it('lets the calibration of one sitting lapse after twelve hours', async () => {
    const sitting = await addSetting(true);
    const { calibration } = (await calibrate({}, sitting.id).expect(200)).body as CalibrationKept;
    expect(calibration.validUntil).toBe('2026-03-01T21:00:00.000Z');
    const holds = async () =>
      ((await browser.get(`/api/rigs/${rig.id}`)).body as RigView).settings[1]?.calibration?.id ?? null;
    expect(await holds()).toBe(calibration.id);
    server.clock.pass(12 * 3600 * 1000);
    await server.db.write('sessions').update({ expires_at: '2027-01-01T00:00:00.000Z' });
    expect(await holds()).toBeNull();
  });

  it('refuses evidence that is not its own picture, and marks outside it', async () => {
    const other = await server.addPerson('photographer');
    for (const id of [
      await addPicture(server, { ownerId: other.id }),
      await addPicture(server, { ownerId: owner.id, state: 'refused' }),
      rig.id,
    ]) {
      expect((await calibrate({ imageId: id }).expect(422)).body).toMatchObject({
        errors: [{ pointer: '#/imageId', code: 'not-your-picture' }],
      });
    }
    const outside = await calibrate({ marks: marks(16) }).expect(422); // the last stands at x = 850
    expect(outside.body).toMatchObject({ errors: [{ pointer: '#/marks/15/at', code: 'outside-the-picture' }] });
  });

  it('refuses what cannot be fitted, and keeps nothing', async () => {
    const two = [
      { at: { x: 1, y: 1 }, index: 0 },
      { at: { x: 4, y: 1 }, index: 1 },
    ];
    expect((await calibrate({ marks: two }).expect(422)).body).toMatchObject({ type: '/problems/reference-too-short' });
    expect(await server.db.read('calibrations')).toEqual([]);
    expect(await server.db.read('image_scales')).toEqual([]);
  });

  it('is private to its owner', async () => {
    const keeper = await server.signIn(await server.addPerson('keeper'));
    await keeper.get(`/api/rigs/${rig.id}`).expect(404);
    await keeper.post(`/api/rigs/${rig.id}/settings`, {}).expect(404);
    expect((await keeper.get('/api/rigs')).body).toEqual([]);
    const another = (await keeper.post('/api/rigs', { name: 'Own', camera: '', remarks: '' })).body as RigView;
    const calibration = { imageId, marks: marks(), spacingUm: 100, toleranceUm: 0 };
    await keeper.post(`/api/rigs/${another.id}/settings/${setting.id}/calibrations`, calibration).expect(404);
  });
});

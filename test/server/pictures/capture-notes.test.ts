import { describe, expect, it } from 'vitest';
import { readCaptureNotes, toNotes } from '../../../server/pictures/capture-notes.js';
import { cleanName } from '../../../server/pictures/arrivals.js';

const SIZE = { width: 4000, height: 3000 };
const capture = (tags: Record<string, unknown>, size = SIZE) => toNotes(tags, size).capture;

describe('what a file says of its making', () => {
  it('takes the time that the shutter opened, with its own offset', () => {
    const tags = {
      DateTimeOriginal: '2025:11:03 10:42:00',
      OffsetTimeOriginal: '+01:00',
      ModifyDate: '2025:12:01 09:00:00',
      OffsetTime: '-05:00',
    };
    expect(capture(tags)).toMatchObject({ local: '2025-11-03T10:42:00', offset: '+01:00' });
    expect(capture({ ModifyDate: tags.ModifyDate, OffsetTime: 'Z' })).toMatchObject({
      local: '2025-12-01T09:00:00',
      offset: null,
    });
  });

  it.each(['0000:00:00 00:00:00', '2025:02:30 10:00:00', '    :  :     :  :  ', 'yesterday', '2025:11:03'])(
    'takes %s for no time',
    (time) => {
      expect(capture({ DateTimeOriginal: time })).toMatchObject({ local: null });
    },
  );

  it.each(['+99:99', '-25:00', '+01:75'])('takes %s for no offset: no instant could be told with it', (offset) => {
    const tags = { DateTimeOriginal: '2025:11:03 10:42:00', OffsetTimeOriginal: offset };
    expect(capture(tags)).toMatchObject({ local: '2025-11-03T10:42:00', offset: null });
  });

  it('does not say the maker twice', () => {
    expect(capture({ Make: 'HOLLIN', Model: 'Hollin H2' }).camera).toBe('Hollin H2');
    expect(capture({ Make: 'Hollin Optical', Model: 'H2' }).camera).toBe('Hollin Optical H2');
    expect(capture({ Model: 'H2\0\0' }).camera).toBe('H2');
  });

  it('knows the pitch by the focal-plane tags: 3954.23 px per inch', () => {
    expect(capture({ FocalPlaneXResolution: 3954.23, FocalPlaneResolutionUnit: 2 }).pixelPitchUm).toBeCloseTo(
      6.423501,
      5,
    );
  });

  it('knows the pitch by the equivalent for film: f 4.3, 26, 4000 × 3000 px', () => {
    expect(capture({ FocalLength: 4.3, FocalLengthIn35mmFormat: 26 }).pixelPitchUm).toBeCloseTo(1.43113, 4);
  });

  it('says no pitch where the file’s pixels are not the sensor’s, or where the tag can’t be right', () => {
    const tags = {
      FocalPlaneXResolution: 3954.23,
      FocalPlaneResolutionUnit: 2,
      ExifImageWidth: 6000,
      ExifImageHeight: 4500,
    };
    expect(capture(tags).pixelPitchUm).toBeNull();
    expect(capture({ FocalPlaneXResolution: 72, FocalPlaneResolutionUnit: 2 }).pixelPitchUm).toBeNull();
  });

  it('spreads the pitch over digital zoom', () => {
    expect(
      capture({ FocalPlaneXResolution: 2500, FocalPlaneResolutionUnit: 3, DigitalZoomRatio: 2 }).pixelPitchUm,
    ).toBe(2);
  });

  it('takes zeros for no place, as cameras without a fix write them', () => {
    expect(toNotes({ latitude: 0, longitude: 0 }, SIZE).exactPlace).toBeNull();
    expect(toNotes({ latitude: Number.NaN, longitude: 3 }, SIZE).exactPlace).toBeNull();
    expect(toNotes({ latitude: 91, longitude: 3 }, SIZE).exactPlace).toBeNull();
    expect(toNotes({ latitude: 54.5, longitude: 3 }, SIZE).exactPlace).toEqual({ latitude: 54.5, longitude: 3 });
  });

  it('says nothing when the notes are broken, instead of refusing the picture', async () => {
    expect(
      (await readCaptureNotes(Buffer.from('Exif\0\0II*\0\xff\xff\xff\xff', 'latin1'), SIZE)).capture.camera,
    ).toBeNull();
  });
});

describe('a file’s own name', () => {
  it.each([
    ['DSC_0001.JPG', 'DSC_0001.JPG'],
    ['C:\\Bilder\\Röhrling.tif', 'Röhrling.tif'],
    ['../../etc/passwd', 'passwd'],
    ['a\u0000b\r\n.jpg', 'ab.jpg'],
    ['\u202egpj.exe', 'gpj.exe'],
    ['', 'picture'],
    ['..', 'picture'],
  ])('%j becomes %j', (name, clean) => {
    expect(cleanName(name)).toBe(clean);
  });
});

import { describe, expect, it } from 'vitest';
import type { TrayPicture } from '@shared/contracts/images';
import { groupPictures } from './groups';

const HERE = { latitude: 54.1, longitude: -0.5 };

function taken(name: string, local: string | null, exactPlace: TrayPicture['exactPlace'] = null): TrayPicture {
  return {
    id: name,
    name,
    bytes: 1,
    state: 'ready',
    refusal: null,
    sameAs: null,
    capture: { local, offset: null, camera: null, lens: null, focalLengthMm: null, pixelPitchUm: null },
    exactPlace,
    role: 'subject',
    light: 'unknown',
    settingId: null,
    image: null,
    uploadedAt: '2025-11-03T18:00:00.000Z',
  };
}

const namesOf = (pictures: readonly TrayPicture[]) =>
  groupPictures(pictures).map((group) => group.pictures.map(({ name }) => name));

describe('suggested finds', () => {
  it('puts together what was taken within ten minutes of the one before, in order of capture', () => {
    const pictures = [
      taken('3', '2025-11-03T10:58:00'),
      taken('1', '2025-11-03T10:42:00'),
      taken('2', '2025-11-03T10:50:00'),
    ];
    expect(namesOf(pictures)).toEqual([['1', '2', '3']]);
    expect(groupPictures(pictures)[0]).toMatchObject({ day: '2025-11-03', from: '10:42', to: '10:58' });
  });

  it('begins a new one after a longer pause', () => {
    expect(namesOf([taken('1', '2025-11-03T10:42:00'), taken('2', '2025-11-03T10:52:01')])).toEqual([['1'], ['2']]);
  });

  it('begins a new one at midnight', () => {
    expect(namesOf([taken('1', '2025-11-03T23:59:00'), taken('2', '2025-11-04T00:01:00')])).toEqual([['1'], ['2']]);
  });

  it('begins a new one after a walk: 0.001° of latitude is 111 m', () => {
    const far = { ...HERE, latitude: HERE.latitude + 0.001 };
    const near = { ...HERE, latitude: HERE.latitude + 0.0003 };
    expect(namesOf([taken('1', '2025-11-03T10:42:00', HERE), taken('2', '2025-11-03T10:43:00', far)])).toEqual([
      ['1'],
      ['2'],
    ]);
    expect(namesOf([taken('1', '2025-11-03T10:42:00', HERE), taken('2', '2025-11-03T10:43:00', near)])).toEqual([
      ['1', '2'],
    ]);
  });

  it('puts what has no date last, by the numbers in its name', () => {
    expect(namesOf([taken('shot 10', null), taken('shot 9', null), taken('dated', '2025-11-03T10:42:00')])).toEqual([
      ['dated'],
      ['shot 9', 'shot 10'],
    ]);
  });
});

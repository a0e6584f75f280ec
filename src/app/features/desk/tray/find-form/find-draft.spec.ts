import { describe, expect, it } from 'vitest';
import type { NewFind } from '@shared/contracts/finds';
import type { TrayPicture } from '@shared/contracts/images';
import { fromFiles, givesAway, LastFindMemory, lastFindOf } from './find-draft';

const taken = (local: string | null, exactPlace: TrayPicture['exactPlace'] = null) =>
  ({ capture: { local }, exactPlace }) as TrayPicture;

const FIND: NewFind = {
  imageIds: [],
  observation: { kind: 'revisit', observedOn: '2025-11-17', substrate: 'on a sleeper', remarks: 'Still there.' },
  place: {
    exact: { words: 'third sleeper', latitude: 54.1, longitude: -0.5, uncertaintyM: null },
    publicWords: 'an old depot',
    sensitivity: 'medium',
  },
  visibility: 'held',
  heldUntil: '2026-05-01',
};

describe('what the files say', () => {
  it('takes the earliest day and the first place', () => {
    const place = { latitude: 54.1, longitude: -0.5 };
    expect(fromFiles([taken('2025-11-04T09:00:00'), taken('2025-11-03T10:42:00', place)])).toEqual({
      day: '2025-11-03',
      severalDays: true,
      place,
    });
  });

  it('has no answer where no file has one', () => {
    expect(fromFiles([taken(null)])).toEqual({ day: null, severalDays: false, place: null });
  });
});

describe('public words that give the exact place away', () => {
  it('notices them whatever the case and the order', () => {
    expect(givesAway('The GATE, by the third sleeper', 'third sleeper from the gate')).toBe(true);
  });

  it('lets a broader wording pass', () => {
    expect(givesAway('an old depot in the Calder Wick district', 'third sleeper from the gate')).toBe(false);
  });

  it('counts house numbers, and not small words', () => {
    expect(givesAway('allotment 14', 'allotment 14')).toBe(true);
    expect(givesAway('at the end of the lane', 'at the top of the log')).toBe(false);
  });

  it('has nothing to say while a field is empty', () => {
    expect(givesAway('', 'third sleeper')).toBe(false);
    expect(givesAway('an old depot', '')).toBe(false);
  });
});

describe('as last time', () => {
  it('takes over all but what is of that find alone: its date, its remarks, its coordinates', () => {
    expect(lastFindOf(FIND)).toEqual({
      kind: 'revisit',
      substrate: 'on a sleeper',
      exactWords: 'third sleeper',
      publicWords: 'an old depot',
      sensitivity: 'medium',
      visibility: 'private',
    });
  });

  it('is kept for one person alone', () => {
    const kept = new Map<string, string>();
    const storage = {
      getItem: (key: string) => kept.get(key) ?? null,
      setItem: (key: string, value: string) => void kept.set(key, value),
    };
    new LastFindMemory(storage, 'maud').write(lastFindOf(FIND));
    expect(new LastFindMemory(storage, 'maud').read()).toEqual(lastFindOf(FIND));
    expect(new LastFindMemory(storage, 'imre').read()).toBeNull();
  });

  it('forgets what it cannot read', () => {
    const storage = { getItem: () => '{"kind":"on the moon"}', setItem: () => undefined };
    expect(new LastFindMemory(storage, 'maud').read()).toBeNull();
  });
});

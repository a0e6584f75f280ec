import { describe, expect, it } from 'vitest';
import { notTaken } from './picture-files';

const bytes = (...values: (number | string)[]) =>
  new Uint8Array(
    values.flatMap((value) => (typeof value === 'number' ? [value] : [...value].map((c) => c.charCodeAt(0)))),
  );

describe('notTaken', () => {
  it('lets through JPEG, PNG, both orders of TIFF, BigTIFF and WebP', () => {
    expect(notTaken(bytes(0xff, 0xd8, 0xff, 0xe1))).toBeNull();
    expect(notTaken(bytes(0x89, 'PNG\r\n', 0x1a, '\n'))).toBeNull();
    expect(notTaken(bytes('II', 42, 0))).toBeNull();
    expect(notTaken(bytes('MM', 0, 42))).toBeNull();
    expect(notTaken(bytes('II', 43, 0))).toBeNull();
    expect(notTaken(bytes('RIFF', 1, 2, 3, 4, 'WEBP'))).toBeNull();
  });

  it('names what people bring besides, so that the refusal can help', () => {
    expect(notTaken(bytes(0, 0, 0, 24, 'ftypheic'))).toBe('HEIC');
    expect(notTaken(bytes('GIF89a'))).toBe('GIF');
    expect(notTaken(bytes('%PDF-1.7'))).toBe('PDF');
  });

  it('is not taken in by a name: a sound file in a RIFF, a text, an empty file', () => {
    expect(notTaken(bytes('RIFF', 1, 2, 3, 4, 'WAVE'))).toBe('unknown');
    expect(notTaken(bytes('just words'))).toBe('unknown');
    expect(notTaken(bytes())).toBe('unknown');
  });
});

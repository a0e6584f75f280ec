import { describe, expect, it } from 'vitest';
import { ownPath } from './own-path';

describe('where to go after signing in', () => {
  it('follows a path of this site', () => {
    expect(ownPath('/desk/tray?x=1')).toBe('/desk/tray?x=1');
  });

  it('never leads elsewhere', () => {
    for (const elsewhere of ['https://elsewhere.example', '//elsewhere.example', '/\\elsewhere.example', 'desk', '']) {
      expect(ownPath(elsewhere)).toBeNull();
    }
    expect(ownPath(undefined)).toBeNull();
  });
});

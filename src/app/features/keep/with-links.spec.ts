import { describe, expect, it } from 'vitest';
import { withLinks } from './with-links';

describe('links in a mail', () => {
  it('finds an address and leaves the full stop after it alone', () => {
    expect(withLinks('Open http://localhost:3000/reset/ab-c. It holds.')).toEqual([
      { text: 'Open ', link: false },
      { text: 'http://localhost:3000/reset/ab-c', link: true },
      { text: '. It holds.', link: false },
    ]);
  });

  it('never makes a link of anything else', () => {
    expect(withLinks('javascript:alert(1)')).toEqual([{ text: 'javascript:alert(1)', link: false }]);
  });
});

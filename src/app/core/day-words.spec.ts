import { dayWords, today } from './day-words';

describe('dayWords', () => {
  it('writes a day, and the day of an instant, the same everywhere', () => {
    expect(dayWords('2025-11-03')).toBe('3 Nov 2025');
    expect(dayWords('2025-11-03T23:59:59.000Z')).toBe('3 Nov 2025');
  });

  it('shows what is no date as it stands', () => {
    expect(dayWords('spring 2024')).toBe('spring 2024');
  });
});

describe('today', () => {
  it('is the reader’s own day, as a date field wants it', () => {
    expect(today(new Date(2026, 2, 5, 23, 30))).toBe('2026-03-05');
  });
});

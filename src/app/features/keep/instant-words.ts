import { dayWords } from '../../core/day-words';

/** `3 Nov 2025, 10:42` on the keeper's own clock. */
export function instantWords(instant: string): string {
  const at = new Date(instant);
  const two = (value: number) => String(value).padStart(2, '0');
  const day = `${at.getFullYear()}-${two(at.getMonth() + 1)}-${two(at.getDate())}`;
  return `${dayWords(day)}, ${two(at.getHours())}:${two(at.getMinutes())}`;
}

/**
 * A day as people read it, "3 Nov 2025", from a day or an instant in ISO 8601.
 *
 * By the text alone, never by the reader's clock: a day is the same everywhere, and the server must
 * write what the browser will. What is no date is shown as it stands.
 */
export function dayWords(iso: string): string {
  const [, year, month, day] = /^(\d{4})-(\d{2})-(\d{2})/.exec(iso) ?? [];
  if (!year || !month || !day) return iso;
  return formatter().format(Date.UTC(Number(year), Number(month) - 1, Number(day)));
}

/** Today where the reader is, YYYY-MM-DD, as date fields want it. */
export function today(now = new Date()): string {
  const twoDigits = (n: number) => String(n).padStart(2, '0');
  return `${now.getFullYear()}-${twoDigits(now.getMonth() + 1)}-${twoDigits(now.getDate())}`;
}

let kept: Intl.DateTimeFormat | null = null;
function formatter(): Intl.DateTimeFormat {
  const locale = !$localize.locale || $localize.locale === 'en' ? 'en-GB' : $localize.locale;
  return (kept ??= new Intl.DateTimeFormat(locale, {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    timeZone: 'UTC',
  }));
}

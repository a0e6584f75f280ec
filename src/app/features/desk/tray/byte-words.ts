/** `12.4 MB`, as cameras and file managers say it: decimal. */
export function byteWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`;
  const power = Math.min(3, Math.floor(Math.log10(bytes) / 3));
  const value = bytes / 1000 ** power;
  return `${value.toFixed(value < 10 && power > 1 ? 1 : 0)} ${['B', 'kB', 'MB', 'GB'][power]}`;
}

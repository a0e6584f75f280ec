import { readFileSync } from 'node:fs';

/** The NIST Statistical Reference Datasets in test/fixtures/nist, as distributed: itl.nist.gov/div898/strd. */
function read(name: string): { text: string; rows: number[][] } {
  const text = readFileSync(new URL(`../fixtures/nist/${name}.dat`, import.meta.url), 'utf8');
  const lines = text.split(/\r?\n/);
  // the data are the last block of lines that hold nothing but numbers
  const lastProse = lines.findLastIndex(
    (line) => (line.trim() !== '' && !/^[\s\d.eE+-]+$/.test(line)) || /^-+$/.test(line.trim()),
  );
  const rows = lines
    .slice(lastProse + 1)
    .filter((line) => line.trim() !== '')
    .map((line) => line.trim().split(/\s+/).map(Number));
  return { text, rows };
}

/** One variable with its certified mean, standard deviation and lag-1 correlation. */
export function univariate(name: string): { values: number[]; mean: number; sd: number; lagOne: number } {
  const { text, rows } = read(name);
  const certified = (label: string) => Number(new RegExp(`${label}.*:\\s*(-?[\\d.]+)`).exec(text)?.[1]);
  return {
    values: rows.map((row) => row[0] as number),
    mean: certified('Sample Mean'),
    sd: certified('Sample Standard Deviation'),
    lagOne: certified('Sample Autocorrelation'),
  };
}

/** y and x of a straight line. */
export function pairs(name: string): { x: number[]; y: number[] } {
  const { rows } = read(name);
  return { y: rows.map((row) => row[0] as number), x: rows.map((row) => row[1] as number) };
}

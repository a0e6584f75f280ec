import { readdirSync } from 'node:fs';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { join } from 'node:path';

/** `npm run bench -- NAME`: runs `test/bench/NAME.bench.ts`; without a name it lists them. */
export interface Benchmark {
  /** what is measured, in one line */
  readonly about: string;
  run(): Promise<void>;
}

const folder = fileURLToPath(new URL('.', import.meta.url));
const names = readdirSync(folder)
  .filter((file) => file.endsWith('.bench.ts'))
  .map((file) => file.replace('.bench.ts', ''));
const load = async (name: string): Promise<Benchmark> =>
  ((await import(pathToFileURL(join(folder, `${name}.bench.ts`)).href)) as { default: Benchmark }).default;

const wanted = process.argv[2];
if (wanted !== undefined && names.includes(wanted)) {
  await (await load(wanted)).run();
} else {
  if (wanted !== undefined) process.stderr.write(`There is no benchmark ${wanted}.\n`);
  for (const name of names) process.stdout.write(`npm run bench -- ${name.padEnd(14)} ${(await load(name)).about}\n`);
  process.exitCode = wanted === undefined ? 0 : 1;
}

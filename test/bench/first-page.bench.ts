import type { Benchmark } from './run.js';
import { BuiltServer, percentile } from './support.js';

const ROUNDS = Number(process.env['ROUNDS'] ?? 20);
const EACH = 10;

/**
 * The gallery page as somebody signed out gets it, kept and freshly rendered, beside the same server's
 * empty client page in the same run. Rounds alternate, and the ratio is the median over the rounds.
 */
const bench: Benchmark = {
  about: "the server's time for the gallery page, beside the empty client page",
  async run() {
    const server = await BuiltServer.open();
    try {
      let asked = 0;
      const pages = {
        shell: () => '/sign-in',
        kept: () => '/',
        // words that nobody asked for before make a page that is not kept
        fresh: () => `/?q=clavata%20${(asked += 1)}`,
        data: () => '/api/gallery',
      };
      const times: Record<keyof typeof pages, number[]> = { shell: [], kept: [], fresh: [], data: [] };
      const ratios: number[] = [];
      for (const page of Object.values(pages)) await server.time(page()); // warm
      for (let round = 0; round < ROUNDS; round++) {
        const medians: Partial<Record<keyof typeof pages, number>> = {};
        for (const name of Object.keys(pages) as (keyof typeof pages)[]) {
          const sample: number[] = [];
          for (let i = 0; i < EACH; i++) sample.push(await server.time(pages[name]()));
          times[name].push(...sample);
          medians[name] = percentile(sample, 0.5);
        }
        ratios.push((medians.kept ?? NaN) / (medians.shell ?? NaN));
      }
      const row = (label: string, sample: readonly number[]): string =>
        `${label.padEnd(34)} p50 ${percentile(sample, 0.5).toFixed(1).padStart(7)} ms   p95 ${percentile(sample, 0.95).toFixed(1).padStart(7)} ms\n`;
      process.stdout.write(row('empty client page (baseline)', times.shell));
      process.stdout.write(row('gallery page, kept', times.kept));
      process.stdout.write(row('gallery page, freshly rendered', times.fresh));
      process.stdout.write(row('gallery as data', times.data));
      process.stdout.write(
        `\ntarget: the kept page at most 2 × the empty one   reached: ${percentile(ratios, 0.5).toFixed(2)} × (median of ${ROUNDS} rounds)\n`,
      );
    } finally {
      await server.close();
    }
  },
};

export default bench;

import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/** The built server on an empty data folder of its own, as `npm start` runs it. */
export class BuiltServer {
  private constructor(
    readonly url: string,
    private readonly child: ChildProcess,
    private readonly dataDir: string,
  ) {}

  static async open(env: Record<string, string> = {}): Promise<BuiltServer> {
    const main = join(ROOT, 'dist/node/server/main.js');
    if (!existsSync(main)) throw new Error('Nothing is built: run npm run build first.');
    const port = await freePort();
    const dataDir = mkdtempSync(join(tmpdir(), 'motebook-bench-'));
    const child = spawn(process.execPath, [main], {
      cwd: ROOT,
      stdio: ['ignore', 'ignore', 'inherit'],
      env: { ...process.env, PORT: String(port), DATA_DIR: dataDir, DEMO: 'on', LOG_LEVEL: 'error', ...env },
    });
    const server = new BuiltServer(`http://127.0.0.1:${port}`, child, dataDir);
    for (let tries = 0; tries < 600; tries++) {
      if (child.exitCode !== null) throw new Error(`The server ended with ${child.exitCode}.`);
      const answer = await fetch(`${server.url}/healthz`).catch(() => null);
      if (answer?.ok) return server;
      await new Promise((resolve) => setTimeout(resolve, 200));
    }
    throw new Error('The server did not open within two minutes.');
  }

  async close(): Promise<void> {
    const ended = new Promise((resolve) => this.child.once('exit', resolve));
    this.child.kill('SIGTERM');
    await ended;
    rmSync(this.dataDir, { recursive: true, force: true });
  }

  /** Milliseconds from asking to the last byte. */
  async time(path: string): Promise<number> {
    const start = performance.now();
    const answer = await fetch(this.url + path);
    await answer.arrayBuffer();
    if (!answer.ok) throw new Error(`${path} answered ${answer.status}.`);
    return performance.now() - start;
  }
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer().once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      probe.close(() => {
        resolve(typeof address === 'object' && address ? address.port : 0);
      });
    });
  });
}

/** The value below which this share of the sample lies (nearest rank). */
export function percentile(sample: readonly number[], share: number): number {
  const sorted = [...sample].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.max(0, Math.ceil(share * sorted.length) - 1))] ?? NaN;
}

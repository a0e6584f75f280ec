import { type ChildProcess, spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { fileURLToPath } from 'node:url';
import { PASSWORD, type Person } from './app.js';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/** The real server in a process of its own, which can be killed. */
export class SpawnedServer {
  private constructor(
    private readonly child: ChildProcess,
    readonly origin: string,
    /** how the process ended */
    readonly ended: Promise<NodeJS.Signals | number | null>,
  ) {}

  static async start(dataDir: string, env: Record<string, string> = {}): Promise<SpawnedServer> {
    const port = await freePort();
    const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
      cwd: ROOT,
      env: { PATH: process.env['PATH'], DATA_DIR: dataDir, PORT: String(port), DEMO: 'off', LOG_LEVEL: 'warn', ...env },
      stdio: ['ignore', 'ignore', 'inherit'],
    });
    const ended = new Promise<NodeJS.Signals | number | null>((resolve) => {
      child.once('exit', (code, signal) => resolve(signal ?? code));
    });
    const server = new SpawnedServer(child, `http://127.0.0.1:${port}`, ended);
    await server.serving();
    return server;
  }

  /** As if the power failed. */
  async kill(): Promise<void> {
    this.child.kill('SIGKILL');
    await this.ended;
  }

  async stop(): Promise<void> {
    this.child.kill('SIGTERM');
    await this.ended;
  }

  /** Headers by which this person is known, as a browser would send them. */
  async signIn(person: Pick<Person, 'email'>): Promise<Record<string, string>> {
    const cookies = new Map<string, string>();
    const keep = (answer: Response): void => {
      for (const line of answer.headers.getSetCookie()) {
        const [name = '', value = ''] = (line.split(';')[0] ?? '').split('=');
        cookies.set(name, value);
      }
    };
    const headers = (): Record<string, string> => ({
      Cookie: [...cookies].map(([name, value]) => `${name}=${value}`).join('; '),
      'X-XSRF-TOKEN': decodeURIComponent(cookies.get('XSRF-TOKEN') ?? ''),
    });
    keep(await fetch(`${this.origin}/api/session`));
    const answer = await fetch(`${this.origin}/api/session`, {
      method: 'POST',
      headers: { ...headers(), 'Content-Type': 'application/json' },
      body: JSON.stringify({ email: person.email, password: PASSWORD }),
    });
    if (!answer.ok) throw new Error(`Signing in answered ${answer.status}.`);
    keep(answer);
    return headers();
  }

  private async serving(): Promise<void> {
    const over = this.ended.then((how) => {
      throw new Error(`The server ended with ${how} before it served.`);
    });
    const answers = async (): Promise<void> => {
      for (;;) {
        const answer = await fetch(`${this.origin}/healthz`).catch(() => null); // not listening yet
        if (answer?.ok) return;
        await new Promise((resolve) => setTimeout(resolve, 50));
      }
    };
    await Promise.race([answers(), over]);
    over.catch(() => undefined); // from here on its end is somebody else's to judge
  }
}

/** Below the range that systems give out by themselves, so that no other test is given it meanwhile. */
async function freePort(): Promise<number> {
  for (;;) {
    const port = 10_000 + Math.floor(Math.random() * 20_000);
    const probe = createServer();
    const free = await new Promise<boolean>((resolve) => {
      probe.once('error', () => resolve(false));
      probe.listen(port, '127.0.0.1', () => probe.close(() => resolve(true)));
    });
    if (free) return port;
  }
}

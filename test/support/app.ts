import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import request from 'supertest';
import { type App, type AppOptions, createApp } from '../../server/app.js';
import type { Clock } from '../../server/clock.js';
import { type Config, readConfig } from '../../server/config.js';
import { type Database, openDatabase } from '../../server/db/database.js';
import { UserTable } from '../../server/db/users.js';
import { newId } from '../../server/ids.js';
import { Passwords } from '../../server/passwords.js';
import type { Role } from '../../shared/permission/can.js';

export const PASSWORD = 'a long enough password';

/** A clock that stands still until it is moved. */
export class TestClock implements Clock {
  constructor(private at = new Date('2026-03-01T09:00:00Z')) {}

  now(): Date {
    return this.at;
  }

  pass(ms: number): void {
    this.at = new Date(this.at.getTime() + ms);
  }
}

export interface Person {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
}

/** The whole server on an empty data folder of its own, without a port. */
export class TestApp {
  private constructor(
    readonly config: Config,
    readonly db: Database,
    readonly clock: TestClock,
    readonly app: App,
  ) {}

  static async open(
    env: Record<string, string> = {},
    options: Partial<Pick<AppOptions, 'limits' | 'mail' | 'pages' | 'intakeLimits'>> = {},
  ): Promise<TestApp> {
    const dataDir = mkdtempSync(join(tmpdir(), 'motebook-test-'));
    const config = readConfig({ DATA_DIR: dataDir, DEMO: 'off', LOG_LEVEL: 'silent', ...env });
    const db = await openDatabase(config.dataDir);
    const clock = new TestClock();
    const log = pino({ level: process.env['TEST_LOG'] ?? config.logLevel });
    const app = createApp({ config, db, clock, log, forTests: true, ...options });
    return new TestApp(config, db, clock, app);
  }

  async close(): Promise<void> {
    await this.app.stop();
    await this.db.close();
    rmSync(this.config.dataDir, { recursive: true, force: true });
  }

  async addPerson(role: Role, name = `A ${role}`): Promise<Person> {
    const person = { id: newId(), name, role, email: `${newId()}@people.example` };
    await new UserTable(this.db).insert({
      ...person,
      creditLine: name,
      defaultLicence: 'by',
      fingertipMm: null,
      portrait: null,
      createdAt: this.clock.now().toISOString(),
      passwordHash: await new Passwords(true).hash(PASSWORD),
    });
    return person;
  }

  /** A browser of somebody signed out. */
  async visit(): Promise<Browser> {
    const browser = new Browser(request.agent(this.app.express));
    await browser.get('/api/session').expect(200);
    return browser;
  }

  /** A browser in which this person is signed in. */
  async signIn(person: Pick<Person, 'email'>): Promise<Browser> {
    const browser = await this.visit();
    await browser.post('/api/session', { email: person.email, password: PASSWORD }).expect(200);
    return browser;
  }
}

/** Keeps cookies and sends the XSRF header back, as the client does. */
export class Browser {
  constructor(readonly agent: ReturnType<typeof request.agent>) {}

  get(path: string): request.Test {
    return this.agent.get(path);
  }

  post(path: string, body: object = {}): request.Test {
    return this.send('post', path, body);
  }

  put(path: string, body: object = {}): request.Test {
    return this.send('put', path, body);
  }

  patch(path: string, body: object = {}): request.Test {
    return this.send('patch', path, body);
  }

  delete(path: string): request.Test {
    return this.send('delete', path);
  }

  send(method: 'post' | 'put' | 'patch' | 'delete', path: string, body?: object): request.Test {
    const sent = this.agent[method](path).set('X-XSRF-TOKEN', this.xsrfToken());
    return body === undefined ? sent : sent.send(body);
  }

  xsrfToken(): string {
    const cookie = this.agent.jar.getCookie('XSRF-TOKEN', {
      domain: '127.0.0.1',
      path: '/',
      secure: false,
      script: false,
    });
    return decodeURIComponent(cookie?.value ?? '');
  }
}

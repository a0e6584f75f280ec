import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { type Browser, type Person, TestApp } from './app.js';

/** A test's server on a port of its own, for clients that speak HTTP themselves. */
export class ServedApp {
  private constructor(
    readonly server: TestApp,
    private readonly http: Server,
    readonly origin: string,
  ) {}

  static async open(env: Record<string, string> = {}): Promise<ServedApp> {
    const server = await TestApp.open(env);
    const http = createServer(server.app.express);
    await new Promise<void>((resolve) => http.listen(0, '127.0.0.1', resolve));
    return new ServedApp(server, http, `http://127.0.0.1:${(http.address() as AddressInfo).port}`);
  }

  async close(): Promise<void> {
    this.http.closeAllConnections();
    await new Promise((resolve) => this.http.close(resolve));
    await this.server.close();
  }

  /** Headers by which this browser's person is known. */
  async headers(person: Person): Promise<Record<string, string>> {
    return sessionHeaders(await this.server.signIn(person));
  }
}

export function sessionHeaders(browser: Browser): Record<string, string> {
  const cookies = browser.agent.jar.getCookies({ domain: '127.0.0.1', path: '/', secure: false, script: false });
  return { Cookie: cookies.toValueString(), 'X-XSRF-TOKEN': browser.xsrfToken() };
}

import { existsSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import type { IncomingMessage } from 'node:http';
import { dirname, extname, join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { fileURLToPath, pathToFileURL } from 'node:url';
import express, { type Request, type RequestHandler, type Response as Answer } from 'express';
import { LRUCache } from 'lru-cache';
import type { Logger } from 'pino';
import { BROWSER_PAGES, isPage, PUBLIC_PAGES } from '../shared/pages.js';
import { nonceOf } from './middleware/security.js';
import type { Xsrf } from './middleware/xsrf.js';
import { NotFound } from './problem.js';

/** What `src/server.ts` exports. It calls the API at `origin`, signed out, and answers null for a page it does not know. */
export type Render = (
  request: IncomingMessage,
  context: { origin: string; publicUrl: string },
) => Promise<Response | null>;

export interface PageOptions {
  /** the built application, with `browser/` and `server/` in it */
  readonly folder: string;
  readonly publicUrl: string;
  /** where this server listens, should the request not say */
  readonly port: number;
  readonly xsrf: Xsrf;
  readonly log: Logger;
  /** number that rises whenever something that everybody sees changes */
  readonly publicRevision: () => Promise<number>;
  /** today's UTC date: finds that are held become public with the day alone */
  readonly day: () => string;
  /** a visitor waits no longer for the server's rendering; then the browser renders by itself */
  readonly patienceMs?: number;
  /** replaced in tests */
  readonly load?: () => Promise<Render>;
}

export interface Pages {
  /** the built files; to be mounted before sessions, which they do not need */
  readonly files: RequestHandler;
  /** HTML; to be mounted after everything else */
  readonly pages: RequestHandler;
}

interface RenderedPage {
  readonly status: number;
  /** with the nonce's placeholder still in it */
  readonly html: string;
  /** where a redirecting page leads */
  readonly location: string | null;
}

const PATIENCE_MS = 3000;
const CACHED_PAGES = 400;
const NOT_BUILT = 'Motebook is not built yet: run `npm run build`.';

/**
 * The browser application: its files, and its pages. Public pages come rendered to visitors who are signed out, so
 * that they show (and can be searched) without script; everybody else gets the empty page, which the browser fills.
 */
export function createPages(options: PageOptions): Pages {
  const { folder, log, xsrf } = options;
  const browser = join(folder, 'browser');
  if (!existsSync(browser)) log.warn(`${NOT_BUILT} (${browser} is missing)`);
  const rendered = new RenderedPages(options);

  return {
    files: builtFiles(browser),
    async pages(req, res) {
      const isGet = req.method === 'GET' || req.method === 'HEAD';
      if (!isGet || extname(req.path) !== '') throw new NotFound('page');
      const isPublic = isPage(req.path, PUBLIC_PAGES);
      const page = isPublic && !req.user ? await rendered.page(req) : null;
      if (page?.location) {
        res.redirect(page.status, page.location);
        return;
      }
      const html = page?.html ?? (await emptyPage(browser));
      if (html === null) {
        res.status(503).type('text').send(`${NOT_BUILT}\n`);
        return;
      }
      xsrf.give(req, res);
      const known = isPublic || isPage(req.path, BROWSER_PAGES);
      send(res.status(page?.status ?? (known ? 200 : 404)), html);
    },
  };
}

function send(res: Answer, html: string): void {
  res.set({ 'Cache-Control': 'private, no-cache', Vary: 'Cookie' });
  res.type('html').send(html.replaceAll('"__CSP_NONCE__"', `"${nonceOf(res)}"`));
}

/** The page without content, as Angular builds it; null while nothing is built. */
async function emptyPage(browser: string): Promise<string | null> {
  for (const name of ['index.csr.html', 'index.html']) {
    const file = join(browser, name);
    if (existsSync(file)) return readFile(file, 'utf8');
  }
  return null;
}

/** Files whose name carries a hash of their content never change; the others are asked about each time. */
function builtFiles(browser: string): RequestHandler {
  const serve = express.static(browser, {
    index: false,
    redirect: false,
    setHeaders(res, path) {
      const hashed = /-[A-Z0-9]{8}\.[a-z0-9]+$/.test(path);
      res.setHeader('Cache-Control', hashed ? 'public, max-age=31536000, immutable' : 'public, no-cache');
    },
  });
  return (req, res, next) => {
    if (extname(req.path) === '' || req.path.endsWith('.html')) next();
    else serve(req, res, next);
  };
}

/** Pages rendered for visitors, each once for every revision of what is public. */
class RenderedPages {
  private readonly cache = new LRUCache<string, Promise<RenderedPage | null>>({ max: CACHED_PAGES });
  private renderer: Promise<Render> | null = null;

  constructor(private readonly options: PageOptions) {}

  /** null when the browser must do it: rendering failed or takes too long. */
  async page(req: Request): Promise<RenderedPage | null> {
    const { log, publicRevision, day, patienceMs = PATIENCE_MS } = this.options;
    const key = `${await publicRevision()} ${day()} ${req.url}`;
    try {
      const kept = this.cache.get(key) ?? this.keep(key, this.render(req));
      const late = Symbol('late');
      const first = await Promise.race([kept, wait(patienceMs, late, { ref: false })]);
      if (first !== late) return first as RenderedPage | null;
      log.warn({ url: req.url }, 'rendering takes too long; the browser renders');
    } catch (error) {
      log.error({ err: error, url: req.url }, 'rendering failed; the browser renders');
    }
    return null;
  }

  /** Two visitors who come at once wait for one rendering. Failures are not kept. */
  private keep(key: string, page: Promise<RenderedPage | null>): Promise<RenderedPage | null> {
    this.cache.set(key, page);
    const forget = (): void => {
      this.cache.delete(key);
    };
    page.then((done) => {
      if (!done) forget();
    }, forget);
    return page;
  }

  private async render(req: Request): Promise<RenderedPage | null> {
    this.renderer ??= this.load();
    const render = await this.renderer;
    const origin = `http://127.0.0.1:${req.socket.localPort ?? this.options.port}`;
    const answer = await render(req, { origin, publicUrl: this.options.publicUrl });
    if (!answer) return null;
    if (answer.status >= 500) throw new Error(`The page answered ${answer.status}.`);
    return { status: answer.status, html: await answer.text(), location: answer.headers.get('location') };
  }

  private load(): Promise<Render> {
    const load = this.options.load ?? (() => importRenderer(this.options.folder));
    const renderer = load();
    renderer.catch(() => {
      this.renderer = null; // built meanwhile, perhaps: the next visitor tries again
    });
    return renderer;
  }
}

async function importRenderer(folder: string): Promise<Render> {
  const built = (await import(pathToFileURL(join(folder, 'server', 'server.mjs')).href)) as { render: Render };
  return built.render;
}

/** `dist/app`, whether this file runs from its source or from `dist/node`. */
export function builtApplication(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, 'package.json'))) folder = dirname(folder);
  return join(folder, 'dist', 'app');
}

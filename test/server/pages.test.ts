import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Render } from '../../server/pages.js';
import { TestApp } from '../support/app.js';

const EMPTY = '<html><app-root ngCspNonce="__CSP_NONCE__"></app-root></html>';
const DAY_MS = 24 * 60 * 60 * 1000;

describe('pages', () => {
  let folder: string;
  let server: TestApp;
  /** what was rendered, in order */
  let rendered: { url: string; origin: string; publicUrl: string }[];
  /** stands in for Angular's rendering; tests replace it */
  let render: Render;

  beforeEach(async () => {
    folder = mkdtempSync(join(tmpdir(), 'motebook-pages-'));
    mkdirSync(join(folder, 'browser', 'media'), { recursive: true });
    writeFileSync(join(folder, 'browser', 'index.csr.html'), EMPTY);
    writeFileSync(join(folder, 'browser', 'main-ABCD2345.js'), `// ${'a line that repeats itself\n'.repeat(200)}`);
    writeFileSync(join(folder, 'browser', 'theme.js'), '// no hash in the name');
    rendered = [];
    render = async (request, context) => {
      rendered.push({ url: request.url ?? '', ...context });
      return new Response(`<style nonce="__CSP_NONCE__"></style><h1>Rendered ${rendered.length}</h1>`);
    };
    const load = async (): Promise<Render> => (request, context) => render(request, context);
    server = await TestApp.open({ PUBLIC_URL: 'http://motes.example' }, { pages: { folder, load } });
  });
  afterEach(async () => {
    await server.close();
    rmSync(folder, { recursive: true });
  });

  const visitor = async () => (await server.visit()).agent;

  it('come rendered to a visitor, from the API of this very server', async () => {
    const answer = await (
      await visitor()
    )
      .get('/finds/0198?from=taxa')
      .expect(200)
      .expect('Content-Type', /^text\/html/);
    expect(answer.text).toContain('<h1>Rendered 1</h1>');
    expect(rendered[0]).toMatchObject({ url: '/finds/0198?from=taxa', publicUrl: 'http://motes.example' });
    expect(rendered[0]?.origin).toMatch(/^http:\/\/127\.0\.0\.1:\d+$/);
  });

  it('come empty to a signed-in person, whose browser fills them', async () => {
    const browser = await server.signIn(await server.addPerson('photographer'));
    const answer = await browser.get('/').expect(200);
    expect(answer.text).toContain('<app-root');
    expect(rendered).toEqual([]);
  });

  it('come empty where only the browser can show them', async () => {
    for (const path of ['/sign-in', '/desk', '/desk/tray', '/images/0198', '/keep/people', '/reset/abc']) {
      const answer = await (await visitor()).get(path).expect(200);
      expect(answer.text).toContain('<app-root');
    }
    expect(rendered).toEqual([]);
  });

  it.each(['/', '/sign-in'])('carry the nonce of their own answer (%s)', async (path) => {
    const agent = await visitor();
    const nonces = [];
    for (const answer of [await agent.get(path), await agent.get(path)]) {
      const allowed = answer.headers['content-security-policy']?.match(/style-src [^;]*'nonce-([^']+)'/)?.[1];
      expect(allowed).toBeTruthy();
      expect(answer.text).toContain(`once="${allowed}"`);
      expect(answer.text).not.toContain('__CSP_NONCE__');
      nonces.push(allowed);
    }
    expect(nonces[0]).not.toBe(nonces[1]);
  });

  it('give the XSRF cookie, so that the first change is possible', async () => {
    for (const path of ['/', '/sign-in']) {
      const answer = await (await server.visit()).agent.get(path).set('Cookie', '');
      expect(String(answer.headers['set-cookie'])).toMatch(/XSRF-TOKEN=/);
    }
  });

  it('are rendered once for each revision of what is public, and each day', async () => {
    const agent = await visitor();
    const heading = async (path: string): Promise<string | undefined> =>
      (await agent.get(path)).text.match(/Rendered \d/)?.[0];
    expect([await heading('/taxa'), await heading('/taxa')]).toEqual(['Rendered 1', 'Rendered 1']);
    expect(await heading('/taxa?q=mite')).toBe('Rendered 2');
    await server.db.write('counters').where({ name: 'public-revision' }).increment('value', 1);
    expect(await heading('/taxa')).toBe('Rendered 3');
    server.clock.pass(DAY_MS);
    expect([await heading('/taxa'), await heading('/taxa')]).toEqual(['Rendered 4', 'Rendered 4']);
  });

  it('are rendered once for two visitors who come at the same time', async () => {
    const agent = await visitor();
    let go: () => void = () => undefined;
    const gate = new Promise<void>((resolve) => (go = resolve));
    const plain = render;
    render = async (...given) => {
      await gate;
      return plain(...given);
    };
    const both = Promise.all([agent.get('/about').then((a) => a.text), agent.get('/about').then((a) => a.text)]);
    go();
    for (const text of await both) expect(text).toContain('Rendered 1');
  });

  it('say 404 where rendering found nothing to show', async () => {
    render = async () => new Response('<h1>Nothing here</h1>', { status: 404 });
    const answer = await (await visitor()).get('/finds/hidden').expect(404);
    expect(answer.text).toContain('Nothing here');
  });

  it('lead on where rendering leads on', async () => {
    render = async () => new Response(null, { status: 302, headers: { location: '/taxa/accepted' } });
    await (await visitor()).get('/taxa/synonym').expect(302).expect('Location', '/taxa/accepted');
  });

  it.each<[string, Render]>([
    ['throws', () => Promise.reject(new Error('broken'))],
    ['knows no such page', () => Promise.resolve(null)],
    ['breaks', () => Promise.resolve(new Response('', { status: 500 }))],
  ])('come empty when rendering %s, and are tried again', async (_how, broken) => {
    const works = render;
    render = broken;
    const agent = await visitor();
    expect((await agent.get('/').expect(200)).text).toContain('<app-root');
    render = works;
    expect((await agent.get('/').expect(200)).text).toContain('Rendered 1');
  });

  it('come empty when rendering takes too long, and rendered once it is done', async () => {
    let go: () => void = () => undefined;
    const gate = new Promise<void>((resolve) => (go = resolve));
    render = async () => {
      await gate;
      return new Response('<h1>Rendered at last</h1>');
    };
    const hasty = await TestApp.open({}, { pages: { folder, load: async () => render, patienceMs: 1 } });
    const { agent } = await hasty.visit();
    expect((await agent.get('/').expect(200)).text).toContain('<app-root');
    go();
    expect((await agent.get('/').expect(200)).text).toContain('Rendered at last');
    await hasty.close();
  });

  it('are 404 where there is none, with the empty page for a person and without for a file', async () => {
    const agent = await visitor();
    expect((await agent.get('/no/such/page').expect(404)).text).toContain('<app-root');
    for (const path of [
      '/missing.js',
      '/main-ZZZZZZZZ.js',
      '/index.html',
      '/index.csr.html',
      '/%2e%2e/server/server.mjs',
    ]) {
      const answer = await agent.get(path).expect(404);
      expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
    }
    expect(rendered).toEqual([]);
  });

  it('bring files that keep for ever where their name tells their content, compressed', async () => {
    const agent = await visitor();
    const hashed = await agent.get('/main-ABCD2345.js').set('Accept-Encoding', 'gzip').expect(200);
    expect(hashed.headers).toMatchObject({
      'cache-control': 'public, max-age=31536000, immutable',
      'content-encoding': 'gzip',
    });
    const plain = await agent.get('/theme.js').expect(200);
    expect(plain.headers['cache-control']).toBe('public, no-cache');
  });

  it('say what to do while the application is not built', async () => {
    rmSync(join(folder, 'browser'), { recursive: true });
    const browser = await server.signIn(await server.addPerson('photographer'));
    expect((await browser.get('/').expect(503)).text).toContain('npm run build');
  });
});

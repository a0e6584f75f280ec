import type { IncomingMessage } from 'node:http';
import { AngularNodeAppEngine, createNodeRequestHandler } from '@angular/ssr/node';
import type { RenderContext } from './app/core/render-context';

const engine = new AngularNodeAppEngine({ allowedHosts: allowedHosts() });

/**
 * Renders a public page for a signed-out visitor, or hands back the empty shell for pages that live
 * in the browser alone. The Express server imports this from `dist/app/server/server.mjs`.
 *
 * The request is made anew at `context.origin` instead of passed on: a `Host` header that a stranger
 * wrote must not decide where the API is called, and cookies must not reach a page that is cached for all.
 *
 * @param context `origin` is where this very server listens; `publicUrl` what visitors call it
 * @returns null when no page matches
 */
export function render(request: IncomingMessage, context: RenderContext): Promise<Response | null> {
  const url = new URL(request.url ?? '/', context.origin);
  const own = new URL(context.origin);
  url.protocol = own.protocol; // `//elsewhere/` as a path would otherwise change the host
  url.host = own.host;
  const publicUrl = context.publicUrl ?? process.env['PUBLIC_URL'];
  return engine.handle(new Request(url, { headers: { accept: 'text/html' } }), {
    origin: context.origin,
    ...(publicUrl ? { publicUrl } : {}),
  } satisfies RenderContext);
}

/** For `ng serve`, which calls it instead of the Express server. */
export const reqHandler = createNodeRequestHandler(async (request, response, next) => {
  try {
    const page = await render(request, { origin: `http://${request.headers.host ?? 'localhost:4200'}` });
    if (!page) return next();
    response.statusCode = page.status;
    page.headers.forEach((value, name) => response.setHeader(name, value));
    response.end(await page.text());
  } catch (error) {
    next(error);
  }
});

function allowedHosts(): string[] {
  const hosts = ['localhost', '127.0.0.1', '[::1]'];
  const publicUrl = process.env['PUBLIC_URL'];
  if (publicUrl && URL.canParse(publicUrl)) hosts.push(new URL(publicUrl).hostname);
  return hosts;
}

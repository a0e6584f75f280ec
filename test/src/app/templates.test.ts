import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const app = fileURLToPath(new URL('../../../src/app', import.meta.url));
const files = readdirSync(app, { recursive: true, encoding: 'utf8' }).filter(
  (file) => file.endsWith('.html') || (file.endsWith('.ts') && !file.endsWith('.spec.ts')),
);
/** an opening tag with its attributes, whose values may hold any sign but their quotes */
const TAG = /<[a-z][\w-]*(?:\s+[^\s"'<>=]+(?:\s*=\s*(?:"[^"]*"|'[^']*'))?)*\s*\/?>/g;
/** a button or link with nothing in it but an icon */
const ICON_ALONE = /(<(button|a)\b(?:"[^"]*"|[^">])*>)\s*<app-icon[^>]*(?:\/>|>\s*<\/app-icon>)\s*<\/\2>/g;

describe('the templates', () => {
  it('translate no attribute that has an interpolation in it: Angular leaves such an attribute out', () => {
    const lost = files.flatMap((file) =>
      (readFileSync(join(app, file), 'utf8').match(TAG) ?? []).flatMap((tag) =>
        Array.from(tag.matchAll(/\si18n-([\w-]+)/g), ([, name]) => name as string)
          .filter((name) => new RegExp(`\\s${name}="[^"]*\\{\\{`).test(tag))
          .map((name) => `${file}: ${name}`),
      ),
    );
    expect(lost).toEqual([]);
  });

  it('give a name to every button and link that shows an icon alone', () => {
    const buttons = files.flatMap((file) =>
      Array.from(readFileSync(join(app, file), 'utf8').matchAll(ICON_ALONE), ([, tag]) => ({ file, tag })),
    );
    expect(buttons).not.toEqual([]);
    const nameless = buttons.filter(({ tag }) => !/aria-label(?:ledby)?\]?="[^"]+"/.test(tag ?? ''));
    expect(nameless).toEqual([]);
  });
});

import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { create, type Font } from 'fontkit';

/** Text as outlines, so that a picture looks the same wherever it was drawn. */
export interface OutlinedText {
  /** SVG path data; the origin is the left end of the base line, y runs down, px */
  readonly path: string;
  /** how far the text advances, px */
  readonly width: number;
}

const require = createRequire(import.meta.url);

/** The first that has a glyph draws it: ≈ ≤ ≥ are in no Source Sans. */
const FONTS = [
  '@fontsource/source-sans-3/files/source-sans-3-latin-600-normal.woff',
  '@fontsource/source-sans-3/files/source-sans-3-latin-ext-600-normal.woff',
  '@fontsource/noto-sans-math/files/noto-sans-math-latin-400-normal.woff',
];

let opened: readonly Font[] | null = null;

function fonts(): readonly Font[] {
  opened ??= FONTS.map((file) => create(readFileSync(require.resolve(file))) as Font);
  return opened;
}

/**
 * @param size height of the em, px
 * @throws {Error} for a character that none of the bundled fonts has: an empty box in a picture would stay unseen
 */
export function outlineText(text: string, size: number): OutlinedText {
  let x = 0;
  const paths: string[] = [];
  for (const { font, run } of runsOf(text)) {
    const scale = size / font.unitsPerEm;
    const { glyphs, positions } = font.layout(run);
    glyphs.forEach((glyph, i) => {
      const { xAdvance = 0, xOffset = 0, yOffset = 0 } = positions[i] ?? {};
      // font units run upwards
      paths.push(
        glyph.path
          .scale(scale, -scale)
          .translate(x + xOffset * scale, -yOffset * scale)
          .toSVG(),
      );
      x += xAdvance * scale;
    });
  }
  return { path: paths.filter((path) => path !== '').join(''), width: x };
}

/** Whether every character can be drawn. */
export function missingCharacters(text: string): string[] {
  return [...text].filter((character) => fontFor(character) === null);
}

function runsOf(text: string): { font: Font; run: string }[] {
  const runs: { font: Font; run: string }[] = [];
  for (const character of text) {
    const font = fontFor(character);
    if (!font)
      throw new Error(`No bundled font has a glyph for ${character} (U+${character.codePointAt(0)?.toString(16)}).`);
    const last = runs[runs.length - 1];
    if (last?.font === font) last.run += character;
    else runs.push({ font, run: character });
  }
  return runs;
}

function fontFor(character: string): Font | null {
  const point = character.codePointAt(0) as number;
  return fonts().find((font) => font.hasGlyphForCodePoint(point)) ?? null;
}

/** Digits as an engraver's pantograph cuts them: single strokes in a box one high. */
interface Spot {
  readonly x: number;
  readonly y: number;
}

const arc = (cx: number, cy: number, rx: number, ry: number, from: number, to: number): Spot[] =>
  Array.from({ length: 25 }, (_, i) => {
    const t = ((from + ((to - from) * i) / 24) * Math.PI) / 180;
    return { x: cx + rx * Math.cos(t), y: cy + ry * Math.sin(t) };
  });

const STROKES: Readonly<Record<string, readonly (readonly Spot[])[]>> = {
  '0': [arc(0.3, 0.5, 0.27, 0.48, 0, 360)],
  '3': [[...arc(0.28, 0.26, 0.24, 0.24, 200, 450), ...arc(0.28, 0.73, 0.27, 0.25, 270, 520)]],
  '4': [
    [
      { x: 0.44, y: 1 },
      { x: 0.44, y: 0.02 },
      { x: 0.02, y: 0.7 },
      { x: 0.6, y: 0.7 },
    ],
  ],
  '5': [[{ x: 0.52, y: 0.02 }, { x: 0.12, y: 0.02 }, { x: 0.07, y: 0.45 }, ...arc(0.27, 0.67, 0.28, 0.31, 225, 500)]],
  '.': [
    [
      { x: 0.06, y: 0.97 },
      { x: 0.08, y: 0.97 },
    ],
  ],
};

/** Strokes of a number, centred about x = 0, from y = 0 down to its height. */
export function glyphStrokes(text: string, height: number): Spot[][] {
  const widths = [...text].map((c) => (c === '.' ? 0.28 : 0.82));
  let x = -widths.reduce((a, b) => a + b, 0) / 2 + 0.1;
  return [...text].flatMap((c, i) => {
    const left = x;
    x += widths[i]!;
    const strokes = STROKES[c];
    if (!strokes) throw new Error(`No strokes for “${c}”.`);
    return strokes.map((stroke) => stroke.map((p) => ({ x: (left + p.x) * height, y: p.y * height })));
  });
}

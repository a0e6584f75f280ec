export interface PublishedBand {
  readonly label: string;
  readonly source: string;
  readonly low: number;
  readonly high: number;
}

export interface PlotInput {
  readonly values: readonly number[];
  readonly bands: readonly PublishedBand[];
  readonly mean: number;
  readonly expanded: number;
}

export interface PlotLayout {
  readonly width: number;
  readonly height: number;
  readonly bands: readonly {
    readonly band: PublishedBand;
    readonly x: number;
    readonly y: number;
    readonly width: number;
    readonly labelX: number;
    readonly anchor: 'start' | 'end';
  }[];
  readonly dots: readonly { readonly x: number; readonly y: number }[];
  readonly mean: { readonly x: number; readonly low: number; readonly high: number; readonly y: number };
  readonly axisY: number;
  readonly ticks: readonly { readonly x: number; readonly label: string | null }[];
}

const WIDTH = 380;
const MARGIN = 14;
const BAND_STEP = 26;
const DOT_ROOM = 40;
const AXIS_ROOM = 26;

/**
 * Where everything of a strip plot stands, in a drawing 380 wide: published ranges above, one dot per
 * body below them, the axis at the bottom. All in µm goes in; no scale is cut.
 *
 * @param input at least one value or band
 */
export function layOutStripPlot({ values, bands, mean, expanded }: PlotInput): PlotLayout {
  const all = [...values, ...bands.flatMap(({ low, high }) => [low, high]), mean - expanded, mean + expanded];
  const axis = niceAxis(Math.min(...all), Math.max(...all));
  const x = (um: number) => MARGIN + ((um - axis.from) / (axis.to - axis.from)) * (WIDTH - 2 * MARGIN);
  const dotsTop = bands.length * BAND_STEP + 8;
  const axisY = dotsTop + DOT_ROOM;
  return {
    width: WIDTH,
    height: axisY + AXIS_ROOM,
    bands: bands.map((band, i) => {
      const [left, right] = [x(band.low), x(band.high)];
      const roomRight = WIDTH - right;
      const onRight = roomRight >= left;
      return {
        band,
        x: left,
        y: i * BAND_STEP + 6,
        width: Math.max(2, right - left),
        labelX: onRight ? right + 8 : left - 8,
        anchor: onRight ? ('start' as const) : ('end' as const),
      };
    }),
    dots: values.map((value, i) => ({ x: x(value), y: dotsTop + 8 + spread(i) * (DOT_ROOM - 18) })),
    mean: { x: x(mean), low: x(mean - expanded), high: x(mean + expanded), y: dotsTop + DOT_ROOM / 2 - 1 },
    axisY,
    ticks: axis.ticks.map((um, i) => ({ x: x(um), label: i % axis.labelEvery === 0 ? String(um) : null })),
  };
}

/** Dots side by side instead of one on another, the same at every drawing: the golden ratio's multiples lie evenly. */
function spread(i: number): number {
  return (i * 0.6180339887) % 1;
}

/** An axis of whole steps of 1, 2 or 5 × 10ⁿ, about eight of them, that holds everything with a step to spare. */
function niceAxis(min: number, max: number) {
  const span = max - min || Math.abs(max) || 1;
  const power = 10 ** Math.floor(Math.log10(span / 8));
  const step = [1, 2, 5, 10].map((m) => m * power).find((each) => span / each <= 9) ?? 10 * power;
  const from = Math.max(0, Math.floor(min / step - 0.5)) * step;
  const to = Math.ceil(max / step + 0.5) * step;
  const count = Math.round((to - from) / step);
  const ticks = Array.from({ length: count + 1 }, (_, i) => Number((from + i * step).toPrecision(12)));
  return { from, to, ticks, labelEvery: count > 8 ? 2 : 1 };
}

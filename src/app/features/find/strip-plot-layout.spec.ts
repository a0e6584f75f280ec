import { layOutStripPlot } from './strip-plot-layout';

const band = (low: number, high: number) => ({ label: 'Trichia varia', source: 'Handbook 1922', low, high });

describe('layOutStripPlot', () => {
  const layout = layOutStripPlot({ values: [8, 9, 8.5], bands: [band(8, 9), band(11, 12)], mean: 8.5, expanded: 0.3 });

  it('draws values and published ranges on one axis', () => {
    const [first, second] = layout.bands;
    expect(layout.dots[0]?.x).toBeCloseTo(first?.x ?? 0);
    expect(layout.dots[1]?.x).toBeCloseTo((first?.x ?? 0) + (first?.width ?? 0));
    expect(second?.x).toBeGreaterThan((first?.x ?? 0) + (first?.width ?? 0));
  });

  it('keeps everything inside the drawing', () => {
    const xs = [...layout.dots.map((dot) => dot.x), layout.mean.low, layout.mean.high];
    expect(Math.min(...xs)).toBeGreaterThan(0);
    expect(Math.max(...xs, ...layout.bands.map((each) => each.x + each.width))).toBeLessThan(layout.width);
    expect(Math.max(...layout.dots.map((dot) => dot.y))).toBeLessThan(layout.axisY);
  });

  it('writes a range’s name where there is room', () => {
    expect(layout.bands.map((each) => each.anchor)).toEqual(['start', 'end']);
  });

  it('has ticks at round steps, labelled', () => {
    // 8 to 12 with nine steps at most: steps of 0.5 µm
    const labels = layout.ticks.flatMap((tick) => tick.label ?? []);
    expect(labels).toContain('8');
    expect(new Set(labels.map((label) => Number(label) % 0.5))).toEqual(new Set([0]));
  });

  it('lays equal values beside one another', () => {
    const { dots } = layOutStripPlot({ values: [8, 8, 8], bands: [], mean: 8, expanded: 0.2 });
    expect(new Set(dots.map((dot) => dot.y.toFixed(2))).size).toBe(3);
  });

  it('never begins below zero', () => {
    const { ticks } = layOutStripPlot({ values: [0.1, 2], bands: [], mean: 1, expanded: 3 });
    expect(Number(ticks[0]?.label)).toBe(0);
  });
});

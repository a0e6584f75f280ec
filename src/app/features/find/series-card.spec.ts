import type { PublishedSizeView } from '@shared/contracts/finds';
import type { SeriesView } from '@shared/contracts/series';
import { seriesCard } from './series-card';

const body = (lengthUm: number | null, widthUm: number | null): SeriesView['bodies'][number] => ({
  noteId: 'n',
  imageId: 'i',
  grounds: lengthUm === null ? 'none' : 'calibrated',
  scaleRelativeUncertainty: lengthUm === null ? null : 0.01,
  lengthPx: 100,
  widthPx: 50,
  lengthUm,
  widthUm,
  lengthU: 0.1,
  widthU: 0.1,
});
const series = (change: Partial<SeriesView>): SeriesView => ({
  id: 's',
  findId: 'f',
  structure: 'spore',
  preparation: { id: 'p', title: 'Slide 2' },
  edgeRule: 'outer',
  ornamentIncluded: null,
  observer: { id: 'o', name: 'Maud' },
  bodies: [body(10, 5), body(12, 6)],
  createdAt: '',
  mayMeasure: false,
  ...change,
});
const size = (change: Partial<PublishedSizeView>): PublishedSizeView => ({
  id: 'x',
  taxonId: 't',
  taxonName: 'Trichia varia',
  structure: 'spore',
  dimension: 'length',
  minUm: 11,
  maxUm: 14,
  source: 'Macbride, The North American Slime-Moulds',
  year: 1922,
  page: '',
  seen: true,
  ...change,
});

describe('seriesCard', () => {
  it('writes spores in the notation that descriptions use, with the find’s fruit bodies', () => {
    const { notation } = seriesCard(series({}), { fruitBodies: 3, publishedSizes: [] });
    expect(notation?.join(', ')).toBe('[2/3/1] 10.0–12.0 × 5.0–6.0 µm (n = 2), Q = 2.00, Qm = 2.00');
  });

  it('holds a dimension only against published sizes of the same structure and dimension', () => {
    const publishedSizes = [
      size({}),
      size({ structure: 'thread' }),
      size({ dimension: 'width', minUm: 6, maxUm: 7, year: null }),
    ];
    const { sizes } = seriesCard(series({}), { fruitBodies: 1, publishedSizes });
    expect(sizes.map((each) => [each.dimension, each.plot.published])).toEqual([
      ['length', [{ name: 'Trichia varia', source: 'Macbride 1922', low: 11, high: 14 }]],
      ['width', [{ name: 'Trichia varia', source: 'Macbride, year unknown', low: 6, high: 7 }]],
    ]);
  });

  it('writes and draws large things in mm', () => {
    const tall = series({ structure: 'stalk', bodies: [body(2000, null), body(2400, null)] });
    const publishedSizes = [size({ structure: 'stalk', minUm: 2000, maxUm: 3000 })];
    const [line] = seriesCard(tall, { fruitBodies: 1, publishedSizes }).sizes;
    expect([line?.plot.unit, line?.plot.values]).toEqual(['mm', [2, 2.4]]);
    expect(line?.printed).toEqual([{ name: 'Trichia varia', words: '2–3\u00A0mm, Macbride 1922' }]);
  });

  it('says how the edge was taken, and that the ornament was not spoken of', () => {
    expect(seriesCard(series({}), { fruitBodies: 1, publishedSizes: [] }).told).toBe(
      'Slide 2 · outer edge · ornament not said · Maud',
    );
  });

  it('has no lengths and no notation without a scale', () => {
    const card = seriesCard(series({ bodies: [body(null, null)] }), { fruitBodies: 1, publishedSizes: [] });
    expect([card.grounds, card.sizes, card.notation]).toEqual([null, [], null]);
  });
});

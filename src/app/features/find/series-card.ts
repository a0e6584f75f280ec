import type { FindView } from '@shared/contracts/finds';
import type { SeriesView } from '@shared/contracts/series';
import type { Scale } from '@shared/scale/scale';
import { notation } from '@shared/taxonomy/spore-notation';
import { MICROMETRES_PER, unitFor } from '@shared/units/length';
import { rangeWords } from '../../core/range-words';
import { groundsOf, summaryOf, valuesUm } from '../../core/series-summary';
import { shortSource } from '../../core/source-words';
import { structureWords } from '../../core/structure-words';
import type { PublishedRange } from '../../ui/strip-plot/strip-plot';

const SPORE = 'spore';
/** µm; the finer step is left to those who can justify it */
const ROUND_TO = 0.1;

export interface SizeLine {
  readonly dimension: 'length' | 'width';
  readonly words: string;
  readonly um: number;
  /** combined standard uncertainty of the mean, µm */
  readonly u: number;
  /** what books say, in words */
  readonly printed: readonly { readonly name: string; readonly words: string }[];
  /** all in `unit` */
  readonly plot: {
    readonly unit: 'µm' | 'mm';
    readonly values: readonly number[];
    readonly published: readonly PublishedRange[];
    readonly mean: { readonly value: number; readonly expanded: number };
  };
}

/** One series as the find shows it. */
export interface SeriesCard {
  readonly id: string;
  readonly title: string;
  readonly told: string;
  readonly n: number;
  /** null: no body has a scale, so there is nothing in µm */
  readonly grounds: Scale['grounds'] | null;
  readonly sizes: readonly SizeLine[];
  /** sizes, Q, Qm: a line may end between them */
  readonly notation: readonly string[] | null;
}

/** @param find whose series it is: its fruit bodies and the published sizes to hold the series against */
export function seriesCard(series: SeriesView, find: Pick<FindView, 'fruitBodies' | 'publishedSizes'>): SeriesCard {
  return {
    id: series.id,
    title: structureWords(series.structure),
    told: toldOf(series),
    n: series.bodies.length,
    grounds: groundsOf(series),
    sizes: (['length', 'width'] as const).flatMap((dimension) => sizeLine(series, dimension, find.publishedSizes)),
    notation: series.structure === SPORE ? sporeNotation(series, find.fruitBodies) : null,
  };
}

function sizeLine(
  series: SeriesView,
  dimension: 'length' | 'width',
  publishedSizes: FindView['publishedSizes'],
): SizeLine[] {
  const summary = summaryOf(series, dimension);
  if (!summary) return [];
  const printed = publishedSizes.filter((size) => size.structure === series.structure && size.dimension === dimension);
  const unit = unitFor(summary.mean);
  const inUnit = (um: number) => um / MICROMETRES_PER[unit];
  return [
    {
      dimension,
      words: dimension === 'length' ? $localize`along` : $localize`across`,
      um: summary.mean,
      u: summary.u,
      printed: printed.map((size) => ({
        name: size.taxonName,
        words: `${rangeWords(size.minUm, size.maxUm)}, ${shortSource(size.source, size.year)}`,
      })),
      plot: {
        unit,
        values: valuesUm(series, dimension).map(inUnit),
        published: printed.map((size) => ({
          name: size.taxonName,
          source: shortSource(size.source, size.year),
          low: inUnit(size.minUm),
          high: inUnit(size.maxUm),
        })),
        mean: { value: inUnit(summary.mean), expanded: inUnit(summary.U) },
      },
    },
  ];
}

/** Of the spores that have a length in µm; one collection, the find itself. */
function sporeNotation(series: SeriesView, fruitBodies: number): readonly string[] | null {
  const bodies = series.bodies.flatMap(({ lengthUm, widthUm }) => (lengthUm === null ? [] : [{ lengthUm, widthUm }]));
  return notation({ bodies, fruitBodies, collections: 1, roundTo: ROUND_TO })?.split(', ') ?? null;
}

function toldOf({ preparation, edgeRule, ornamentIncluded, observer }: SeriesView): string {
  const edge = { outer: $localize`outer edge`, inner: $localize`inner edge`, middle: $localize`middle of the wall` };
  const ornament =
    ornamentIncluded === null
      ? $localize`ornament not said`
      : ornamentIncluded
        ? $localize`ornament in`
        : $localize`ornament out`;
  return [preparation?.title ?? $localize`no preparation`, edge[edgeRule], ornament, observer.name].join(' · ');
}

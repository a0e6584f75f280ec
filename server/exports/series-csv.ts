import { stringify } from 'csv-stringify/sync';
import type { SeriesView } from '../../shared/contracts/series.js';

/** What the file says of the series besides its values. */
export interface SeriesFile {
  readonly series: SeriesView;
  readonly findNumber: string;
  /** as it stands now; null without a name */
  readonly name: string | null;
  readonly medium: string;
  readonly stain: string;
}

/**
 * The values of a series with all that is needed to judge them: first what they are of, then one row per body.
 *
 * Lengths in µm with their standard uncertainty (k = 1), and in pixels of the upright original. A cell that a
 * spreadsheet would take for a formula is led by an apostrophe. UTF-8 with a byte-order mark, without which
 * spreadsheets take µ for two signs; lines end in CRLF (RFC 4180).
 */
export function seriesCsv({ series, findNumber, name, medium, stain }: SeriesFile): string {
  const about: string[][] = [
    ['find', findNumber],
    ['name', name ?? 'not named'],
    ['structure', series.structure],
    ['preparation', series.preparation?.title ?? 'none'],
    ['medium', medium || 'not said'],
    ['stain', stain || 'not said'],
    ['edge rule', series.edgeRule],
    ['ornament', ORNAMENT[String(series.ornamentIncluded) as keyof typeof ORNAMENT]],
    ['observer', series.observer.name],
    ['bodies', String(series.bodies.length)],
    ['uncertainties', 'standard, k = 1; scale and pointing, without the edge'],
    [],
  ];
  const rows = series.bodies.map((body, i) => [
    i + 1,
    body.lengthUm,
    body.lengthU,
    body.widthUm,
    body.widthU,
    ratio(body),
    body.lengthPx,
    body.widthPx,
    body.grounds,
    body.scaleRelativeUncertainty,
    body.imageId,
  ]);
  const text = stringify([...about, COLUMNS, ...rows], { escape_formulas: true, record_delimiter: 'windows' });
  return `\uFEFF${text}`;
}

/** Needs no scale; without one, pixels are taken as square. */
function ratio({ lengthUm, widthUm, lengthPx, widthPx }: SeriesView['bodies'][number]): number | null {
  const [length, width] = lengthUm !== null && widthUm !== null ? [lengthUm, widthUm] : [lengthPx, widthPx];
  return length === null || !width ? null : length / width;
}

const ORNAMENT = { true: 'included', false: 'left out', null: 'not said' } as const;

const COLUMNS = [
  'body',
  'length (µm)',
  'u length (µm)',
  'width (µm)',
  'u width (µm)',
  'Q (1)',
  'length (px)',
  'width (px)',
  'scale known by',
  'u scale (fraction)',
  'picture',
];

/** `CW-214-spore-values.csv`: letters, digits and dashes only, as any file system takes them. */
export function seriesFileName({ series, findNumber }: Pick<SeriesFile, 'series' | 'findNumber'>): string {
  const structure = series.structure.replace(/[^A-Za-z0-9]+/g, '-').replace(/^-+|-+$/g, '');
  return `${findNumber}-${structure || 'series'}-values.csv`;
}

import type { Knex } from 'knex';
import type { PersonRef } from '../../shared/contracts/common.js';
import type { BodyView, EditSeries } from '../../shared/contracts/series.js';
import type { Grounds } from '../../shared/scale/scale.js';
import type { EdgeRule } from '../../shared/series/series.js';
import type { Database } from './database.js';

/** Repeated measurements of one structure of one preparation by one observer, without the bodies. */
export interface Series {
  readonly id: string;
  readonly findId: string;
  readonly structure: string;
  readonly preparation: {
    readonly id: string;
    readonly title: string;
    readonly medium: string;
    readonly stain: string;
  } | null;
  readonly edgeRule: EdgeRule;
  readonly ornamentIncluded: boolean | null;
  readonly observer: PersonRef;
  readonly createdAt: string;
}

/** What there is only one series of. */
export interface SeriesKey {
  readonly findId: string;
  readonly preparationId: string | null;
  readonly observerId: string;
  readonly structure: string;
}

interface Row {
  id: string;
  find_id: string;
  preparation_id: string | null;
  preparation_title: string | null;
  preparation_medium: string | null;
  preparation_stain: string | null;
  observer_id: string;
  observer_name: string;
  structure: string;
  edge_rule: EdgeRule;
  ornament_included: number | null;
  created_at: string;
}

interface ValueRow {
  series_id: string;
  note_id: string;
  image_id: string;
  dimension: 'length' | 'width';
  px: number;
  um: number | null;
  u: number | null;
  grounds: Grounds | null;
  relative_uncertainty: number | null;
}

export class SeriesTable {
  constructor(private readonly db: Database) {}

  async find(id: string, knex: Knex = this.db.read): Promise<Series | null> {
    const row = (await seriesQuery(knex).where('series.id', id).first()) as Row | undefined;
    return row ? toSeries(row) : null;
  }

  async withKey(key: SeriesKey, knex: Knex = this.db.read): Promise<Series | null> {
    const row = (await seriesQuery(knex)
      .where({
        'series.find_id': key.findId,
        'series.preparation_id': key.preparationId,
        'series.observer_id': key.observerId,
        'series.structure': key.structure,
      })
      .first()) as Row | undefined;
    return row ? toSeries(row) : null;
  }

  async ofFind(findId: string): Promise<Series[]> {
    const rows = (await seriesQuery(this.db.read)
      .where('series.find_id', findId)
      .orderBy(['series.created_at', 'series.id'])) as Row[];
    return rows.map(toSeries);
  }

  /** all observers' of one preparation of a find; null: of what lies under no preparation */
  async ofPreparation(findId: string, preparationId: string | null): Promise<Series[]> {
    const all = await this.ofFind(findId);
    return all.filter((series) => (series.preparation?.id ?? null) === preparationId);
  }

  /** what is measured now, by series: each body once, in the order in which they were first drawn */
  async bodies(seriesIds: readonly string[]): Promise<Map<string, BodyView[]>> {
    const rows = (await this.db
      .read('measurements')
      .join('measurement_values', 'measurement_values.measurement_id', 'measurements.id')
      .leftJoin('image_scales', 'image_scales.id', 'measurement_values.image_scale_id')
      .whereIn('measurements.series_id', seriesIds)
      .whereNull('measurements.superseded_at')
      .whereNull('measurement_values.superseded_at')
      // ids of notes are UUIDv7, made when the body was first drawn
      .orderBy(['measurements.series_id', 'measurements.note_id'])
      .select(
        'measurements.series_id',
        'measurements.note_id',
        'measurements.image_id',
        'measurement_values.dimension',
        'measurement_values.px',
        'measurement_values.um',
        'measurement_values.u',
        'image_scales.grounds',
        'image_scales.relative_uncertainty',
      )) as ValueRow[];
    const byBody = new Map<string, ValueRow[]>();
    for (const row of rows) {
      const key = `${row.series_id} ${row.note_id}`;
      byBody.set(key, [...(byBody.get(key) ?? []), row]);
    }
    const bySeries = new Map<string, BodyView[]>();
    for (const values of byBody.values()) {
      const seriesId = (values[0] as ValueRow).series_id;
      bySeries.set(seriesId, [...(bySeries.get(seriesId) ?? []), toBody(values)]);
    }
    return bySeries;
  }

  /** The unique index makes it impossible to open one twice. */
  async insert(
    series: SeriesKey & { id: string; edgeRule: EdgeRule; ornamentIncluded: boolean | null; createdAt: string },
    trx: Knex.Transaction,
  ): Promise<void> {
    await trx('series').insert({
      id: series.id,
      find_id: series.findId,
      preparation_id: series.preparationId,
      observer_id: series.observerId,
      structure: series.structure,
      edge_rule: series.edgeRule,
      ornament_included: series.ornamentIncluded,
      created_at: series.createdAt,
    });
  }

  async update(id: string, change: EditSeries): Promise<void> {
    const columns = {
      ...(change.edgeRule !== undefined && { edge_rule: change.edgeRule }),
      ...(change.ornamentIncluded !== undefined && { ornament_included: change.ornamentIncluded }),
    };
    if (Object.keys(columns).length > 0) await this.db.write('series').where({ id }).update(columns);
  }

  /** where a picture stands: its find and preparation; null while it is in no find */
  async placeOfImage(
    imageId: string,
    knex: Knex = this.db.read,
  ): Promise<{ findId: string; preparationId: string | null } | null> {
    const row = (await knex('images')
      .join('observations', 'observations.id', 'images.observation_id')
      .where('images.id', imageId)
      .first('observations.find_id', 'images.preparation_id')) as
      { find_id: string; preparation_id: string | null } | undefined;
    return row ? { findId: row.find_id, preparationId: row.preparation_id } : null;
  }
}

function seriesQuery(knex: Knex): Knex.QueryBuilder {
  return knex('series')
    .join('users', 'users.id', 'series.observer_id')
    .leftJoin('preparations', 'preparations.id', 'series.preparation_id')
    .select('series.*', {
      observer_name: 'users.name',
      preparation_title: 'preparations.title',
      preparation_medium: 'preparations.medium',
      preparation_stain: 'preparations.stain',
    });
}

function toSeries(row: Row): Series {
  return {
    id: row.id,
    findId: row.find_id,
    structure: row.structure,
    preparation:
      row.preparation_id === null
        ? null
        : {
            id: row.preparation_id,
            title: row.preparation_title ?? '',
            medium: row.preparation_medium ?? '',
            stain: row.preparation_stain ?? '',
          },
    edgeRule: row.edge_rule,
    ornamentIncluded: row.ornament_included === null ? null : Boolean(row.ornament_included),
    observer: { id: row.observer_id, name: row.observer_name },
    createdAt: row.created_at,
  };
}

/** @param values of one body, one or two dimensions; all of one picture and scale */
function toBody(values: readonly ValueRow[]): BodyView {
  const [first] = values as [ValueRow];
  const length = values.find((value) => value.dimension === 'length');
  const width = values.find((value) => value.dimension === 'width');
  return {
    noteId: first.note_id,
    imageId: first.image_id,
    grounds: first.grounds ?? 'none',
    scaleRelativeUncertainty: first.relative_uncertainty,
    lengthPx: length?.px ?? null,
    widthPx: width?.px ?? null,
    lengthUm: length?.um ?? null,
    widthUm: width?.um ?? null,
    lengthU: length?.u ?? null,
    widthU: width?.u ?? null,
  };
}

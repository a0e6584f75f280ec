import type { Database } from '../../../server/db/database.js';
import { newId } from '../../../server/ids.js';

const AT = '2026-02-01T09:00:00.000Z';

/** One row or two in each table that people fill, parents with children: a public find and a private one. */
export async function fillEveryTable({ write: knex }: Pick<Database, 'write'>): Promise<void> {
  const [user, taxon, rig, setting] = [newId(), newId(), newId(), newId()];
  await knex('users').insert({
    id: user,
    email: `${user}@people.example`,
    name: 'Imre',
    role: 'photographer',
    password_hash: 'x',
    credit_line: 'Imre',
    default_licence: 'by',
    created_at: AT,
  });
  await knex('tokens').insert({
    id: newId(),
    kind: 'reset',
    token_hash: newId(),
    email: 'a@b.example',
    user_id: user,
    created_at: AT,
    expires_at: AT,
  });
  await knex('sessions').insert({ sid: newId(), user_id: user, data: '{}', expires_at: AT });
  await knex('mails').insert({ id: newId(), to: 'a@b.example', subject: 's', text: 't', html: 'h', created_at: AT });
  await knex('jobs').insert({
    id: newId(),
    kind: 'intake',
    about: user,
    payload: '{}',
    state: 'done',
    run_after: AT,
    created_at: AT,
  });
  await knex('taxa').insert({
    id: taxon,
    name: 'Trichia varia',
    authorship: '',
    rank: 'species',
    code: 'botanical',
    created_at: AT,
  });
  await knex('published_sizes').insert({
    id: newId(),
    taxon_id: taxon,
    structure: 'spore',
    dimension: 'length',
    min_um: 12,
    max_um: 14,
    source: 'a book',
    page: '1',
    seen: true,
  });
  await knex('rigs').insert({ id: rig, owner_id: user, name: 'r', camera: 'c', remarks: '', created_at: AT });
  await knex('settings').insert({
    id: setting,
    rig_id: rig,
    name: 's',
    objective: '40',
    one_sitting: false,
    capture_mode: '',
    created_at: AT,
  });
  await fillFind(knex, { user, taxon, setting, number: 1, visibility: 'public', words: 'depot' });
  await fillFind(knex, { user, taxon, setting, number: 2, visibility: 'private', words: 'secret' });
}

async function fillFind(
  knex: Database['write'],
  find: { user: string; taxon: string; setting: string; number: number; visibility: string; words: string },
): Promise<void> {
  const { user, taxon, setting } = find;
  const [id, observation, preparation, image, calibration, scale, series, note, measurement, determination] =
    Array.from({ length: 10 }, newId) as string[];
  await knex('finds').insert({
    id,
    prefix: 'CW',
    number: find.number,
    owner_id: user,
    visibility: find.visibility,
    standing_id: determination,
    sensitivity: 'none',
    exact_words: find.words,
    public_words: find.words,
    created_at: AT,
  });
  await knex('find_place_readers').insert({ find_id: id, user_id: user });
  await knex('observations').insert({
    id: observation,
    find_id: id,
    kind: 'in the field',
    observed_on: '2026-02-01',
    observer_id: user,
    substrate: '',
    remarks: '',
    created_at: AT,
  });
  await knex('preparations').insert({
    id: preparation,
    observation_id: observation,
    title: 'p',
    part: '',
    medium: '',
    stain: '',
    condition: 'fresh',
    created_at: AT,
  });
  await knex('determinations').insert({
    id: determination,
    find_id: id,
    taxon_id: taxon,
    name: 'Trichia varia',
    authorship: '',
    rank: 'species',
    code: 'botanical',
    qualifier: '',
    reason: 'r',
    confidence: 'certain',
    by_id: user,
    determined_at: AT,
  });
  await knex('images').insert({
    id: image,
    owner_id: user,
    observation_id: observation,
    preparation_id: preparation,
    setting_id: setting,
    state: 'ready',
    sha256: image,
    original_name: 'a.jpg',
    bytes: 1,
    format: 'jpeg',
    width: 100,
    height: 100,
    bit_depth: 8,
    licence: 'by',
    credit_line: 'Imre',
    current_scale_id: scale,
    uploaded_at: AT,
  });
  await knex('calibrations').insert({
    id: calibration,
    setting_id: setting,
    image_id: image,
    marks: '[]',
    spacing_um: 10,
    tolerance_um: 1,
    um_per_px_x: 1,
    um_per_px_y: 1,
    relative_uncertainty: 0.01,
    fit_relative: 0.01,
    reference_relative: 0.01,
    graduations: 2,
    span_um: 90,
    frame_width: 100,
    frame_height: 100,
    valid_from: AT,
    created_by: user,
    created_at: AT,
  });
  await knex('image_scales').insert({
    id: scale,
    image_id: image,
    grounds: 'calibrated',
    um_per_px_x: 1,
    um_per_px_y: 1,
    relative_uncertainty: 0.01,
    calibration_id: calibration,
    provenance: '{}',
    set_by: user,
    set_at: AT,
  });
  await knex('series').insert({
    id: series,
    find_id: id,
    preparation_id: preparation,
    observer_id: user,
    structure: 'spore',
    edge_rule: 'outer',
    created_at: AT,
  });
  await knex('notes').insert({
    id: note,
    image_id: image,
    layer: user,
    kind: 'measure',
    series_id: series,
    geometry: '{}',
    text: '',
    last_seq: 1,
  });
  await knex('note_edits').insert({
    id: newId(),
    image_id: image,
    note_id: note,
    author_id: user,
    after: '{}',
    outcome: 'applied',
    created_at: AT,
  });
  await knex('measurements').insert({
    id: measurement,
    series_id: series,
    note_id: note,
    image_id: image,
    geometry: '{}',
    created_at: AT,
  });
  await knex('measurement_values').insert({
    id: newId(),
    measurement_id: measurement,
    image_scale_id: scale,
    dimension: 'length',
    px: 10,
    um: 10,
    u: 0.1,
    created_at: AT,
  });
}

import type { Knex } from 'knex';

/** Pictures, rigs, calibrations, and the versions of each picture's scale. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('rigs', (t) => {
    t.text('id').primary();
    t.text('owner_id').notNullable().references('users.id').onDelete('CASCADE').index();
    t.text('name').notNullable();
    t.text('camera').notNullable();
    t.text('remarks').notNullable();
    t.text('created_at').notNullable();
  });
  await knex.schema.createTable('settings', (t) => {
    t.text('id').primary();
    t.text('rig_id').notNullable().references('rigs.id').onDelete('CASCADE').index();
    t.text('name').notNullable();
    t.text('objective').notNullable();
    t.float('magnification');
    t.float('numerical_aperture');
    t.boolean('one_sitting').notNullable();
    t.text('capture_mode').notNullable();
    t.text('created_at').notNullable();
  });
  await knex.schema.createTable('images', (t) => {
    t.text('id').primary(); // also the id of its upload
    t.text('owner_id').notNullable().references('users.id').index();
    t.text('observation_id').references('observations.id').index();
    t.text('preparation_id').references('preparations.id').index();
    t.text('setting_id').references('settings.id').index();
    t.text('state').notNullable(); // waiting | working | ready | refused
    t.text('refusal'); // JSON {code, parameters}
    t.integer('revision').notNullable().defaultTo(1);
    t.text('sha256').notNullable().index();
    t.text('original_name').notNullable();
    t.integer('bytes').notNullable();
    t.text('format'); // jpeg | png | tiff | webp
    /** upright pixels; null until intake has read them */
    t.integer('width');
    t.integer('height');
    t.integer('bit_depth');
    t.text('role').notNullable().defaultTo('subject');
    t.text('light').notNullable().defaultTo('unknown');
    t.text('title').notNullable().defaultTo('');
    t.text('alt_text').notNullable().defaultTo('');
    t.text('licence').notNullable();
    t.text('credit_line').notNullable();
    t.text('captured_local');
    t.text('captured_offset');
    t.text('camera');
    t.text('lens');
    t.float('focal_length_mm');
    t.float('pixel_pitch_um');
    t.float('exact_latitude');
    t.float('exact_longitude');
    t.text('colours').notNullable().defaultTo('[]'); // JSON
    t.text('rendition_widths').notNullable().defaultTo('[]'); // JSON
    t.text('current_scale_id');
    t.text('uploaded_at').notNullable();
  });
  /** Immutable: a better calibration is a new row. */
  await knex.schema.createTable('calibrations', (t) => {
    t.text('id').primary();
    t.text('setting_id').notNullable().references('settings.id').onDelete('CASCADE').index();
    t.text('image_id').notNullable().references('images.id');
    t.text('marks').notNullable(); // JSON
    t.text('cross_marks'); // JSON
    t.float('spacing_um').notNullable();
    t.float('tolerance_um').notNullable();
    t.float('um_per_px_x').notNullable();
    t.float('um_per_px_y').notNullable();
    t.float('relative_uncertainty').notNullable();
    t.float('fit_relative').notNullable();
    t.float('reference_relative').notNullable();
    t.float('residual_sd_px');
    t.integer('graduations').notNullable();
    t.float('span_um').notNullable();
    t.integer('frame_width').notNullable();
    t.integer('frame_height').notNullable();
    t.text('valid_from').notNullable();
    t.text('valid_until');
    t.text('created_by').notNullable().references('users.id');
    t.text('created_at').notNullable();
  });
  /** Append-only: the newest row is the picture's scale, the others its history. */
  await knex.schema.createTable('image_scales', (t) => {
    t.text('id').primary();
    t.text('image_id').notNullable().references('images.id').onDelete('CASCADE').index();
    t.text('grounds').notNullable();
    t.float('um_per_px_x');
    t.float('um_per_px_y');
    t.float('relative_uncertainty');
    t.text('calibration_id').references('calibrations.id').index();
    t.text('provenance').notNullable(); // JSON, ScaleProvenance
    t.text('set_by').notNullable().references('users.id');
    t.text('set_at').notNullable();
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['image_scales', 'calibrations', 'images', 'settings', 'rigs']) {
    await knex.schema.dropTable(table);
  }
}

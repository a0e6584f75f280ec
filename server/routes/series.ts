import { seriesRoutes } from '../../shared/contracts/series.js';
import { seriesCsv, seriesFileName } from '../exports/series-csv.js';
import { userIdOf } from '../middleware/actor.js';
import type { SeriesService } from '../services/series.js';
import type { Mount } from './mount.js';

export function mountSeries(mount: Mount, { series }: { series: SeriesService }): void {
  mount.route(seriesRoutes.ofImage, ({ actor, params }) => series.ofImage(actor, params['imageId'] ?? ''));

  mount.route(seriesRoutes.open, ({ actor, params, body }) =>
    series.open(actor, userIdOf(actor), params['imageId'] ?? '', body),
  );

  mount.route(seriesRoutes.read, ({ actor, params }) => series.read(actor, params['seriesId'] ?? ''));

  mount.route(seriesRoutes.edit, ({ actor, params, body }) => series.edit(actor, params['seriesId'] ?? '', body));

  mount.route(seriesRoutes.csv, async ({ actor, params, res }) => {
    const file = await series.file(actor, params['seriesId'] ?? '');
    res.attachment(seriesFileName(file));
    res.type('text/csv; charset=utf-8').send(seriesCsv(file));
  });
}

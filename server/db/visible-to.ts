import type { Knex } from 'knex';
import type { Actor } from '../../shared/permission/can.js';

/**
 * `can(actor, 'find.read', …)` as SQL, for lists. The query must have `finds` in it.
 * The tests hold the two against each other.
 *
 * @param day  today's UTC date, for finds held until a date
 */
export function visibleTo(actor: Actor, day: string): (query: Knex.QueryBuilder) => void {
  return (query) => {
    query.where((either) => {
      either.where('finds.visibility', 'public');
      either.orWhere((held) => held.where('finds.visibility', 'held').where('finds.held_until', '<=', day));
      if (actor.kind === 'user') {
        either.orWhere('finds.owner_id', actor.id).orWhere('finds.visibility', 'group');
      }
    });
  };
}

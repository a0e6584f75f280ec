import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Knex } from 'knex';
import { visibleTo } from '../../../server/db/visible-to.js';
import { newId } from '../../../server/ids.js';
import { type Actor, can, type FindThing, ROLES, VISIBILITIES, VISITOR } from '../../../shared/permission/can.js';
import { type Person, TestApp } from '../../support/app.js';

/** `can` decides one thing, `visibleTo` a list in SQL: they must never disagree. */
describe('what lists show', () => {
  let server: TestApp;
  let people: Person[];
  beforeAll(async () => {
    server = await TestApp.open();
    people = [];
    for (const role of ROLES) people.push(await server.addPerson(role));
  });
  afterAll(() => server.close());

  const days = fc.constantFrom('2026-02-28', '2026-03-01', '2026-03-02');
  const finds = fc.record({
    owner: fc.nat({ max: ROLES.length - 1 }),
    visibility: fc.constantFrom(...VISIBILITIES),
    heldUntil: fc.option(days),
    readers: fc.uniqueArray(fc.nat({ max: ROLES.length - 1 })),
  });
  const actors = fc.option(fc.nat({ max: ROLES.length - 1 }));

  it('is exactly what each actor may read, for any finds, actor and day', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(finds, { minLength: 1, maxLength: 8 }), actors, days, async (made, who, day) => {
        const person = who === null ? null : (people[who] as Person);
        const actor: Actor = person ? { kind: 'user', id: person.id, role: person.role } : VISITOR;
        const rows = await inserted(made);
        const listed = (await server.db
          .read('finds')
          .where(visibleTo(actor, day))
          .orderBy('id')
          .pluck('id')) as string[];
        const allowed = rows.filter(({ thing }) => can(actor, 'find.read', thing, day)).map(({ id }) => id);
        expect(listed).toEqual(allowed.sort());
      }),
      { numRuns: 150 },
    );
  });

  /** puts these finds, and no others, into the table */
  async function inserted(
    made: readonly {
      owner: number;
      visibility: FindThing['visibility'];
      heldUntil: string | null;
      readers: number[];
    }[],
  ) {
    const idOf = (n: number): string => (people[n] as Person).id;
    return server.db.write.transaction(async (trx: Knex.Transaction) => {
      await trx('finds').delete();
      const rows: { id: string; thing: FindThing }[] = [];
      for (const [number, find] of made.entries()) {
        const id = newId();
        const thing: FindThing = {
          kind: 'find',
          ownerId: idOf(find.owner),
          visibility: find.visibility,
          heldUntil: find.heldUntil,
          placeReaders: find.readers.map(idOf),
        };
        await trx('finds').insert({
          id,
          prefix: 'T',
          number,
          owner_id: thing.ownerId,
          visibility: thing.visibility,
          held_until: thing.heldUntil,
          sensitivity: 'none',
          exact_words: '',
          public_words: '',
          created_at: '2026-03-01T00:00:00.000Z',
        });
        for (const reader of thing.placeReaders)
          await trx('find_place_readers').insert({ find_id: id, user_id: reader });
        rows.push({ id, thing });
      }
      return rows;
    });
  }
});

import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { visibleTo } from '../../../server/db/visible-to.js';
import { type Actor, can, ROLES, VISITOR } from '../../../shared/permission/can.js';
import { type NamedThing, Things } from '../../support/things.js';
import { TestApp } from '../../support/app.js';

describe('what lists show', () => {
  let server: TestApp;
  let things: Things;
  let finds: NamedThing[];
  let actors: Actor[];
  beforeEach(async () => {
    server = await TestApp.open();
    const owner = await server.addPerson('photographer');
    const observer = await server.addPerson('photographer');
    things = new Things(server, owner, observer);
    finds = await things.every('find');
    const strangers = await Promise.all(ROLES.map((role) => server.addPerson(role)));
    actors = [VISITOR, ...[owner, observer, ...strangers].map(({ id, role }): Actor => ({ kind: 'user', id, role }))];
  });
  afterEach(() => server.close());

  it('is exactly what one may read', async () => {
    for (const actor of actors) {
      const listed = (await server.db.read('finds').where(visibleTo(actor, things.today)).pluck('finds.id')) as string[];
      const readable = finds.filter(({ thing }) => can(actor, 'find.read', thing, things.today));
      expect(listed.sort()).toEqual(readable.map(({ ids }) => ids.findId).sort());
    }
    expect(finds.length).toBeGreaterThan(5);
  });

  it('stays so beside other conditions of the query', async () => {
    const none = server.db.read('finds').where('finds.prefix', 'XX').where(visibleTo(VISITOR, things.today));
    expect(await none).toEqual([]);
  });
});

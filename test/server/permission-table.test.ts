import type { Express } from 'express';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { RouteContract } from '../../shared/contracts/route.js';
import { ROUTES } from '../../shared/contracts/routes.js';
import { type Actor, type ActionsOn, can, type Thing, VISITOR } from '../../shared/permission/can.js';
import { type Browser, TestApp } from '../support/app.js';
import { EXAMPLES, type Example, type Ids } from '../support/route-examples.js';
import { Things } from '../support/things.js';

/**
 * Every route × every actor × every ownership and visibility, generated from the contracts: what HTTP answers
 * against what `can()` says of the thing as it was put in.
 */

const ACTORS = ['visitor', 'photographer', 'identifier', 'editor', 'keeper', 'owner', 'observer'] as const;
type ActorName = (typeof ACTORS)[number];

/** `hidden`: answered as if it were not there. `not mounted` and `broken` are never right. */
type Outcome = 'allowed' | 'hidden' | 'sign in first' | 'forbidden' | 'not mounted' | `broken: ${string}`;

interface NamedRoute {
  readonly name: string;
  readonly contract: RouteContract;
  readonly example: Example;
}

const ALL: NamedRoute[] = Object.entries(ROUTES).flatMap(([group, routes]) =>
  Object.entries(routes as Record<string, RouteContract>).map(([key, contract]) => ({
    name: `${group}.${key}`,
    contract,
    example: (EXAMPLES as unknown as Record<string, Record<string, Example>>)[group]?.[key] ?? {},
  })),
);

describe('the permission table', () => {
  let server: TestApp;
  let things: Things;
  const people = {} as Record<Exclude<ActorName, 'visitor'>, Actor & { kind: 'user' } & { email: string }>;
  const browsers = {} as Record<ActorName, Browser>;

  beforeAll(async () => {
    server = await TestApp.open();
    await server.db.write.raw('pragma synchronous = off'); // thousands of rows that need not outlive this test
    for (const name of ACTORS) {
      if (name === 'visitor') continue;
      const { id, role, email } = await server.addPerson(
        name === 'owner' || name === 'observer' ? 'photographer' : name,
      );
      people[name] = { kind: 'user', id, role, email };
    }
    for (const name of ACTORS) await arrive(name);
    things = new Things(server, people.owner, people.observer);
  });
  afterAll(() => server.close());

  async function arrive(name: ActorName): Promise<void> {
    browsers[name] = name === 'visitor' ? await server.visit() : await server.signIn(people[name]);
  }

  it.each(ALL)('holds for $name', async ({ contract, example }) => {
    const wrong: string[] = [];
    for (const named of await things.every(contract.on)) {
      for (const name of ACTORS) {
        const actor = name === 'visitor' ? VISITOR : people[name];
        const expected = expectedOutcome(actor, contract, named.thing, things.today);
        const ids = actor.kind === 'user' ? { ...named.ids, actorId: actor.id } : named.ids;
        const found = await ask(browsers[name], contract, example, ids);
        if (found !== expected) wrong.push(`${name} on ${named.name}: ${found}, not ${expected}`);
        if (example.endsSession) await arrive(name);
      }
    }
    expect(wrong).toEqual([]);
  });

  it('names every API route that is mounted, and no other', () => {
    const contracts = ALL.map(({ contract }) => `${contract.method} ${contract.path}`);
    const mounted = mountedRoutes(server.app.express).filter((route) => route.includes(' /api/'));
    expect([...new Set(mounted)].filter((route) => !route.includes(UPLOADS)).sort()).toEqual([...contracts].sort());
  });
});

/** Resumable uploads follow the tus protocol, not a contract of ours; they have a test of their own. */
const UPLOADS = ' /api/uploads';

function expectedOutcome(actor: Actor, contract: RouteContract, thing: Thing, today: string): Outcome {
  if (!can(actor, `${contract.on}.read` as ActionsOn[Thing['kind']], thing, today)) return 'hidden';
  if (can(actor, contract.action, thing, today)) return 'allowed';
  return actor.kind === 'visitor' ? 'sign in first' : 'forbidden';
}

async function ask(browser: Browser, contract: RouteContract, example: Example, ids: Ids): Promise<Outcome> {
  const path = contract.path.replace(/:(\w+)/g, (_all, name: string) => idOf(ids, name)) + (example.query ?? '');
  const body = example.body?.(ids);
  const answer = await (contract.method === 'get' ? browser.get(path) : browser.send(contract.method, path, body));
  return outcomeOf(answer.status, answer.body as ProblemBody, contract.on);
}

interface ProblemBody {
  readonly type?: string;
  readonly detail?: string;
  readonly parameters?: { readonly what?: string };
}

/** The gate's own answers, told apart from what a handler says about the request. */
function outcomeOf(status: number, problem: ProblemBody, on: Thing['kind']): Outcome {
  const code = problem.type?.replace('/problems/', '');
  if (status >= 500 || code === 'stale-page') return `broken: ${status} ${code}`;
  if (status === 404 && code === 'not-found') {
    if (problem.parameters?.what === 'page') return 'not mounted';
    if (problem.parameters?.what === on) return 'hidden';
  }
  if (status === 401 && code === 'not-signed-in') return 'sign in first';
  if (status === 403 && code === 'forbidden') return 'forbidden';
  return 'allowed';
}

function idOf(ids: Ids, parameter: string): string {
  const id = ({ ...ids } as Record<string, string>)[parameter];
  if (id === undefined) throw new Error(`The examples know no id for :${parameter}.`);
  return id;
}

/** `get /api/session`, for every route that Express has. */
function mountedRoutes(app: Express): string[] {
  return app.router.stack.flatMap(({ route }) =>
    route ? route.stack.map(({ method }) => `${method} ${route.path}`) : [],
  );
}

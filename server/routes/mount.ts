import type { Request, Response, Router } from 'express';
import { z } from 'zod';
import type { $ZodType, output } from 'zod/v4/core';
import { type Actor, type ActionsOn, can, type Thing } from '../../shared/permission/can.js';
import type { RouteContract } from '../../shared/contracts/route.js';
import { actorOf } from '../middleware/actor.js';
import { Forbidden, Invalid, NotFound, NotSignedIn } from '../problem.js';
import type { ThingTable } from '../db/things.js';
import { type Clock, today } from '../clock.js';

type Parsed<S> = S extends $ZodType ? output<S> : undefined;

/** What a handler is given: everything is parsed, and the permission has been asked. */
export interface Call<C extends RouteContract> {
  readonly actor: Actor;
  readonly params: Readonly<Record<string, string>>;
  readonly query: Parsed<C['query']>;
  readonly body: Parsed<C['body']>;
  readonly req: Request;
  readonly res: Response;
}

type Answer<C extends RouteContract> = C['response'] extends $ZodType ? output<C['response']> : void;

/**
 * Mounts routes as their contracts say. The permission is asked here, for every route, before the body is
 * looked at: what the actor may not see answers 404, what they see but may not do 403, or 401 to visitors.
 */
export class Mount {
  constructor(
    private readonly router: Router,
    private readonly things: ThingTable,
    private readonly clock: Clock,
    /** answers are held against their contract; on in tests and development */
    private readonly checkAnswers: boolean,
  ) {}

  route<const C extends RouteContract>(contract: C, handle: (call: Call<C>) => Promise<Answer<C>> | Answer<C>): void {
    this.router[contract.method](contract.path, async (req: Request, res: Response) => {
      const actor = actorOf(req);
      const params = req.params as Record<string, string>;
      await this.permit(actor, contract, params);
      const answer = await handle({
        actor,
        params,
        query: parse(contract.query, req.query) as Parsed<C['query']>,
        body: parse(contract.body, req.body as unknown) as Parsed<C['body']>,
        req,
        res,
      });
      if (res.headersSent || res.writableEnded) return;
      if (answer === undefined) {
        res.status(204).end();
        return;
      }
      if (this.checkAnswers && contract.response) {
        const checked = z.safeParse(contract.response, answer);
        if (!checked.success)
          throw new Error(`${contract.method} ${contract.path} breaks its contract: ${checked.error.message}`);
      }
      res.json(answer);
    });
  }

  private async permit(actor: Actor, contract: RouteContract, params: Record<string, string>): Promise<void> {
    const day = today(this.clock);
    const thing = await this.things.load(contract.on, contract.param === null ? null : (params[contract.param] ?? ''));
    const reads: Record<Thing['kind'], ActionsOn[Thing['kind']]> = {
      find: 'find.read',
      image: 'image.read',
      series: 'series.read',
      rig: 'rig.read',
      site: 'site.read',
    };
    if (!thing || !can(actor, reads[contract.on], thing, day)) throw new NotFound(contract.on);
    if (can(actor, contract.action, thing, day)) return;
    throw actor.kind === 'visitor' ? new NotSignedIn() : new Forbidden(contract.action);
  }
}

/** @throws {Invalid} naming each field that is wrong */
function parse(schema: $ZodType | undefined, input: unknown): unknown {
  if (!schema) return undefined;
  const parsed = z.safeParse(schema, input ?? {});
  if (parsed.success) return parsed.data;
  throw new Invalid(
    parsed.error.issues.map((issue) => ({
      pointer: `#/${issue.path.map(String).join('/')}`,
      code: issue.code,
      detail: issue.message,
    })),
  );
}

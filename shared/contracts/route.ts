import type { $ZodType } from 'zod/v4/core';
import type { ActionsOn, Thing } from '../permission/can.js';

/**
 * What one HTTP route is: the server mounts it, the client calls it, and the table of
 * route × role × ownership is generated from it. `on` names the thing whose permission is asked,
 * and `param` the path parameter that holds its id (none for the site as a whole).
 */
export interface RouteContract {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** as Express writes it: `/api/finds/:findId` */
  readonly path: string;
  readonly on: Thing['kind'];
  readonly param: string | null;
  readonly action: ActionsOn[Thing['kind']];
  readonly body?: $ZodType;
  readonly query?: $ZodType;
  /** absent where the answer is not JSON (a file) or has no body */
  readonly response?: $ZodType;
}

/** Keeps the literal types of a group of routes while checking their form. */
export function defineRoutes<const T extends Record<string, RouteContract>>(routes: T): T {
  return routes;
}

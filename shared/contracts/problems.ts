import * as z from 'zod/mini';

/**
 * A problem as RFC 9457 states it. `type` is `/problems/{code}`; `parameters` are the figures that the
 * client words it with; `errors` point at fields of the request by JSON Pointer.
 */
export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.optional(z.string()),
  instance: z.optional(z.string()),
  parameters: z.optional(z.record(z.string(), z.union([z.string(), z.number()]))),
  errors: z.optional(z.array(z.object({ pointer: z.string(), code: z.string(), detail: z.string() }))),
});
export type Problem = z.infer<typeof Problem>;

/** `reference-too-short` of `/problems/reference-too-short`. */
export function problemCode(problem: Pick<Problem, 'type'>): string {
  return problem.type.replace(/^.*\/problems\//, '');
}

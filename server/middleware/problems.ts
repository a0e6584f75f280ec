import { randomUUID } from 'node:crypto';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Logger } from 'pino';
import { DomainError } from '../../shared/errors.js';
import type { Problem } from '../../shared/contracts/problems.js';
import { DiskFull, HttpProblem, isDiskFull, NotFound } from '../problem.js';

/** The one place where errors become RFC 9457 answers. */
export function problems(log: Logger): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    if (res.headersSent) {
      next(error); // too late for an answer: let Express end the connection
      return;
    }
    const instance = `/requests/${randomUUID().slice(0, 8)}`;
    const problem = toHttpProblem(error);
    if (!problem || problem.status === 507)
      log.error({ err: error, instance, url: req.originalUrl }, problem?.message ?? 'unexpected error');
    const status = problem?.status ?? 500;
    const body: Problem = {
      type: `/problems/${problem?.code ?? 'unexpected'}`,
      title: (problem?.code ?? 'unexpected').replaceAll('-', ' '),
      status,
      instance,
      ...(problem && { detail: problem.message }),
      ...(problem && Object.keys(problem.parameters).length > 0 && { parameters: { ...problem.parameters } }),
      ...(problem && problem.errors.length > 0 && { errors: [...problem.errors] }),
    };
    res.status(status).type('application/problem+json').send(JSON.stringify(body));
  };
}

/** For API paths that nothing answers. */
export const unknownPath: RequestHandler = () => {
  throw new NotFound('page');
};

/** null for what nobody expected. */
function toHttpProblem(error: unknown): HttpProblem | null {
  if (error instanceof HttpProblem) return error;
  if (isDiskFull(error)) return new DiskFull();
  if (error instanceof DomainError) return new HttpProblem(422, error.code, error.message, error.parameters);
  if (!isHttpError(error)) return null;
  // express.json, multer and csrf-csrf throw errors that carry a status and are meant to be shown
  if (error.code === 'EBADCSRFTOKEN')
    return new HttpProblem(403, 'stale-page', 'The request carries no valid XSRF token.');
  if (error.status === 413 || error.code === 'LIMIT_FILE_SIZE') return new HttpProblem(413, 'too-large', error.message);
  return error.status < 500 ? new HttpProblem(error.status, 'bad-request', error.message) : null;
}

function isHttpError(error: unknown): error is Error & { status: number; code?: string } {
  if (!(error instanceof Error)) return false;
  if ('code' in error && typeof error.code === 'string' && error.code.startsWith('LIMIT_')) {
    Object.assign(error, { status: 400 });
    return true;
  }
  return 'status' in error && typeof error.status === 'number';
}

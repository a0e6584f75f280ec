import { describe, expect, it } from 'vitest';
import { roomIn, uploadProblem } from '../../../server/pictures/upload-problem.js';

const ROOM = 10 * 1024 ** 3;

describe('an upload that fails', () => {
  it.each<[string, unknown, number]>([
    ['a write of ours', Object.assign(new Error('ENOSPC: /data/x'), { code: 'ENOSPC' }), ROOM],
    ['the database', Object.assign(new Error('database or disk is full'), { code: 'SQLITE_FULL' }), ROOM],
    ['a write whose cause is hidden', { status_code: 500, body: 'Something went wrong receiving the file' }, 4096],
  ])('for want of room says so: %s', (_, error, room) => {
    const answer = uploadProblem(error, room);
    expect(answer?.status_code).toBe(507);
    expect(JSON.parse(answer?.body ?? '')).toMatchObject({ type: '/problems/disk-full', status: 507 });
  });

  it('for a reason that nobody expected keeps it to the log', () => {
    const answer = uploadProblem(new Error('insert into images … /data/originals'), ROOM);
    expect(answer).toEqual({
      status_code: 500,
      body: '{"type":"/problems/unexpected","title":"unexpected","status":500}',
    });
  });

  it('by the rules of the protocol is answered as that has it, be there room or not', () => {
    expect(uploadProblem({ status_code: 409, body: 'Conflict' }, ROOM)).toBeNull();
    expect(uploadProblem({ status_code: 413, body: 'Too large' }, 0)).toBeNull();
  });

  it('asks the disk itself', async () => {
    expect(await roomIn('/tmp')).toBeGreaterThan(0);
  });
});

import express from 'express';
import { pino } from 'pino';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { problems } from '../../../server/middleware/problems.js';

async function answerTo(error: Error): Promise<request.Response> {
  const app = express();
  app.get('/', () => {
    throw error;
  });
  app.use(problems(pino({ level: 'silent' })));
  return request(app).get('/');
}

describe('an error on our side', () => {
  it.each(['SQLITE_FULL', 'ENOSPC', 'EDQUOT'])('for want of room (%s) says so', async (code) => {
    const answer = await answerTo(Object.assign(new Error('insert into finds: full at /data'), { code }));
    expect(answer.status).toBe(507);
    expect(JSON.parse(answer.text)).toMatchObject({ type: '/problems/disk-full' });
    expect(answer.text).not.toContain('/data');
  });

  it('that nobody expected tells nothing of itself but a number', async () => {
    const answer = await answerTo(new Error('insert into finds (exact_words) …'));
    expect(answer.status).toBe(500);
    expect(JSON.parse(answer.text)).toEqual({
      type: '/problems/unexpected',
      title: 'unexpected',
      status: 500,
      instance: expect.stringMatching(/^\/requests\/[0-9a-f]{8}$/) as string,
    });
  });
});

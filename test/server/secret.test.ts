import { mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { sessionSecret } from '../../server/secret.js';

describe('the session secret', () => {
  let dataDir: string;
  beforeEach(() => {
    dataDir = mkdtempSync(join(tmpdir(), 'motebook-secret-'));
  });
  afterEach(() => {
    rmSync(dataDir, { recursive: true });
  });

  it('is made once and kept in the data folder, for its owner’s eyes alone', () => {
    const nested = join(dataDir, 'not', 'there', 'yet');
    const made = sessionSecret({ sessionSecret: null, dataDir: nested });
    expect(made).toMatch(/^[0-9a-f]{64}$/);
    expect(sessionSecret({ sessionSecret: null, dataDir: nested })).toBe(made);
    expect(readFileSync(join(nested, 'session-secret'), 'utf8').trim()).toBe(made);
    expect(statSync(join(nested, 'session-secret')).mode & 0o077).toBe(0);
  });

  it('differs from folder to folder', () => {
    const [a, b] = ['a', 'b'].map((name) => sessionSecret({ sessionSecret: null, dataDir: join(dataDir, name) }));
    expect(a).not.toBe(b);
  });

  it('is what the environment says, where it says one', () => {
    const configured = 'a secret of more than thirty-two characters';
    expect(sessionSecret({ sessionSecret: configured, dataDir })).toBe(configured);
    expect(() => statSync(join(dataDir, 'session-secret'))).toThrow('ENOENT');
  });
});

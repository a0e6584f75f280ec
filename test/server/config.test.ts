import { isAbsolute } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readConfig } from '../../server/config.js';

describe('the configuration', () => {
  it('is whole without any setting', () => {
    const config = readConfig({});
    expect(config).toMatchObject({ port: 3000, demo: true, sessionSecret: null, publicUrl: 'http://localhost:3000' });
    expect(config.maxUploadBytes).toBe(500 * 1024 * 1024);
    expect(config.maxPixels).toBe(200_000_000);
    expect(isAbsolute(config.dataDir)).toBe(true);
  });

  it('takes a setting that is empty as one that is left out', () => {
    expect(readConfig({ PORT: '', DEMO: '' })).toMatchObject({ port: 3000, demo: true });
  });

  it('builds links on the public address, without a slash at its end', () => {
    expect(readConfig({ PUBLIC_URL: 'https://motes.example/' }).publicUrl).toBe('https://motes.example');
    expect(readConfig({ PORT: '8080' }).publicUrl).toBe('http://localhost:8080');
  });

  it.each([
    ['PORT', 'eighty'],
    ['PORT', '70000'],
    ['DEMO', 'maybe'],
    ['SESSION_SECRET', 'too short'],
    ['PUBLIC_URL', 'motes.example'],
    ['PUBLIC_URL', 'ftp://motes.example'],
    ['MAX_UPLOAD_MB', '-1'],
    ['MAX_MEGAPIXELS', 'many'],
    ['FIND_PREFIX', 'c w'],
    ['LOG_LEVEL', 'loud'],
  ])('refuses %s=%s and names it', (name, value) => {
    expect(() => readConfig({ [name]: value })).toThrow(
      new RegExp(`settings in the environment are not right:\n  ${name}: .+`),
    );
  });

  it('names everything that is wrong at once', () => {
    expect(() => readConfig({ PORT: 'eighty', DEMO: 'maybe' })).toThrow(/PORT: [^]*DEMO: /);
  });
});

import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { beforeEach, describe, expect, it } from 'vitest';
import { Jobs } from './jobs';

const DONE = {
  id: 'd',
  kind: 'intake',
  about: 'one.jpg',
  state: 'done',
  attempts: 1,
  lastError: null,
  createdAt: '2025-11-03T10:00:00.000Z',
};
const FAILED = { ...DONE, id: 'f', about: 'two.tif', state: 'failed', attempts: 5, lastError: 'took too long' };

describe('work on the keeper’s desk', () => {
  let fixture: ComponentFixture<Jobs>;
  let http: HttpTestingController;
  const rows = () =>
    [...(fixture.nativeElement as HTMLElement).querySelectorAll('tbody tr')].map((row) => row.textContent ?? '');

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    http = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(Jobs);
    TestBed.tick();
    http.expectOne('/api/keep/jobs').flush([DONE, FAILED]);
    await fixture.whenStable();
  });

  it('puts what failed first, with why', () => {
    expect(rows()[0]).toContain('two.tif');
    expect(rows()[0]).toContain('took too long');
  });

  it('tries a failed one again', async () => {
    (fixture.nativeElement as HTMLElement).querySelector<HTMLButtonElement>('tbody button')!.click();
    http.expectOne('/api/keep/jobs/f/retry').flush({ ...FAILED, state: 'waiting', lastError: null });
    await fixture.whenStable();
    expect(rows()[0]).toContain('waiting');
    expect(rows()[0]).not.toContain('Try again');
  });
});

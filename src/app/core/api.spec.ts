import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { findRoutes } from '@shared/contracts/finds';
import { galleryRoutes } from '@shared/contracts/gallery';
import { Api, pathOf } from './api';
import type { ApiProblem } from './api-problem';

describe('Api', () => {
  let api: Api;
  let http: HttpTestingController;
  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    api = TestBed.inject(Api);
    http = TestBed.inject(HttpTestingController);
  });
  afterEach(() => http.verify());

  it('fills the ids into the path, escaped', () => {
    const path = pathOf(findRoutes.decide, { params: { findId: 'a/b', determinationId: 'd' } });
    expect(path).toBe('/api/finds/a%2Fb/standing/d');
  });

  it('leaves out of the query what is not there', () => {
    api.call(galleryRoutes.page, { query: { q: '', taxon: undefined, limit: 12 } }).subscribe();
    http.expectOne('/api/gallery?limit=12').flush({});
  });

  it('sends the body by the method of the contract', () => {
    api.call(findRoutes.edit, { params: { findId: 'f' }, body: { fruitBodies: 3 } }).subscribe();
    const { request } = http.expectOne({ method: 'PATCH', url: '/api/finds/f' });
    expect(request.body).toEqual({ fruitBodies: 3 });
  });

  it('hands problems on with code, figures and fields', () => {
    let met: ApiProblem | undefined;
    api
      .call(findRoutes.read, { params: { findId: 'f' } })
      .subscribe({ error: (problem: ApiProblem) => (met = problem) });
    const body = {
      type: '/problems/too-many-tries',
      title: 'x',
      status: 429,
      parameters: { seconds: 9 },
      errors: [{ pointer: '#/a', code: 'too_small', detail: 'x' }],
    };
    http.expectOne('/api/finds/f').flush(body, { status: 429, statusText: 'x' });
    expect([met?.code, met?.parameters, met?.fields[0]?.pointer]).toEqual(['too-many-tries', { seconds: 9 }, '#/a']);
  });

  it('tells an answer that never came from one that was no problem document', () => {
    const codes: string[] = [];
    const ask = () =>
      api
        .call(findRoutes.read, { params: { findId: 'f' } })
        .subscribe({ error: (p: ApiProblem) => codes.push(p.code) });
    ask();
    http.expectOne('/api/finds/f').error(new ProgressEvent('error'));
    ask();
    http.expectOne('/api/finds/f').flush('<html>', { status: 502, statusText: 'Bad Gateway' });
    expect(codes).toEqual(['offline', 'unexpected']);
  });
});

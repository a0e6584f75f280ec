import { FetchBackend, HttpHeaders, HttpRequest, HttpResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { firstValueFrom, of } from 'rxjs';
import { RenderingBackend } from './rendering-backend';

describe('RenderingBackend', () => {
  it('lets an answer travel with the page that it was rendered into', async () => {
    const headers = new HttpHeaders({ 'Cache-Control': 'private, no-cache', ETag: '"7"' });
    const backend = { handle: () => of(new HttpResponse({ status: 200, body: { total: 2 }, headers })) };
    TestBed.configureTestingModule({ providers: [RenderingBackend, { provide: FetchBackend, useValue: backend }] });
    const answer = await firstValueFrom(
      TestBed.inject(RenderingBackend).handle(new HttpRequest('GET', '/api/gallery')),
    );
    expect(answer).toBeInstanceOf(HttpResponse);
    if (!(answer instanceof HttpResponse)) return;
    expect(answer.headers.has('Cache-Control')).toBe(false);
    expect(answer.headers.get('ETag')).toBe('"7"');
    expect(answer.body).toEqual({ total: 2 });
  });
});

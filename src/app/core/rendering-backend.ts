import { FetchBackend, type HttpBackend, HttpResponse, type HttpEvent, type HttpRequest } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { map, type Observable } from 'rxjs';

/**
 * The way to the API while a page is rendered on the server. What comes is a visitor's view, as no cookie goes along,
 * and stands in the page already, so that it may travel with it. The API forbids caches to keep its answers, which
 * Angular takes to forbid that too: the browser would ask for all of it again, and the page would blink meanwhile.
 */
@Injectable()
export class RenderingBackend implements HttpBackend {
  private readonly backend = inject(FetchBackend);

  handle(request: HttpRequest<unknown>): Observable<HttpEvent<unknown>> {
    return this.backend
      .handle(request)
      .pipe(
        map((event) =>
          event instanceof HttpResponse ? event.clone({ headers: event.headers.delete('Cache-Control') }) : event,
        ),
      );
  }
}

import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { SessionStore } from '../../core/session-store';
import { SignIn } from './sign-in';

const IMRE = {
  name: 'Imre Waddell',
  role: 'photographer' as const,
  email: 'imre@x.example',
  password: 'under the sleepers',
};

describe('signing in', () => {
  let fixture: ComponentFixture<SignIn>;
  let http: HttpTestingController;
  const page = () => fixture.nativeElement as HTMLElement;

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])] });
    TestBed.inject(SessionStore).take({ user: null, demo: [IMRE] });
    http = TestBed.inject(HttpTestingController);
    vi.spyOn(TestBed.inject(Router), 'navigateByUrl').mockResolvedValue(true);
    fixture = TestBed.createComponent(SignIn);
    await fixture.whenStable();
  });
  afterEach(() => http.verify());

  it('takes one touch in the demo, which says that it is one', async () => {
    expect(page().querySelector('.demo h2')?.textContent).toContain('demo');
    page().querySelector<HTMLButtonElement>('.demo button')!.click();
    const call = http.expectOne('/api/session');
    expect(call.request.body).toEqual({ email: IMRE.email, password: IMRE.password });
    call.flush({ user: null, demo: [] });
    expect(TestBed.inject(Router).navigateByUrl).toHaveBeenCalledWith('/desk');
  });

  it('goes back to where one came from', async () => {
    fixture.componentRef.setInput('then', '/desk/rigs');
    page().querySelector<HTMLButtonElement>('.demo button')!.click();
    http.expectOne('/api/session').flush({ user: null, demo: [] });
    expect(TestBed.inject(Router).navigateByUrl).toHaveBeenCalledWith('/desk/rigs');
  });

  it('says beside the fields what is missing, and asks nobody', async () => {
    page().querySelector('form')!.dispatchEvent(new Event('submit'));
    await fixture.whenStable();
    expect([...page().querySelectorAll('mat-error')].map((error) => error.textContent?.trim())).toEqual([
      'This is needed.',
      'This is needed.',
    ]);
  });

  it('says in words that the two do not match', async () => {
    page().querySelector<HTMLButtonElement>('.demo button')!.click();
    http
      .expectOne('/api/session')
      .flush({ type: '/problems/wrong-sign-in', title: '', status: 401 }, { status: 401, statusText: 'Unauthorized' });
    await fixture.whenStable();
    expect(page().querySelector('app-problem')?.textContent).toContain('do not match');
  });
});

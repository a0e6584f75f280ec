import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { People } from './people';

const TAMSIN = {
  id: 't',
  name: 'Tamsin Pell',
  email: 't@x.example',
  role: 'keeper',
  createdAt: '2025-11-01T08:00:00.000Z',
  lastSeenAt: null,
};
const IMRE = { ...TAMSIN, id: 'i', name: 'Imre Waddell', email: 'i@x.example', role: 'photographer' };
const OPEN = { id: 'inv', email: 'new@x.example', role: 'editor', expiresAt: '2025-11-20T00:00:00.000Z' };

describe('people on the keeper’s desk', () => {
  let fixture: ComponentFixture<People>;
  let http: HttpTestingController;
  const page = () => fixture.nativeElement as HTMLElement;
  const selects = () => [...page().querySelectorAll<HTMLSelectElement>('tbody select')];
  const choose = (select: HTMLSelectElement, role: string) => {
    select.value = role;
    select.dispatchEvent(new Event('change'));
  };

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    http = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(People);
    TestBed.tick();
    http.expectOne('/api/keep/people').flush({ people: [TAMSIN, IMRE], invitations: [OPEN] });
    await fixture.whenStable();
  });
  afterEach(() => http.verify());

  it('shows each with their role', () => {
    expect(selects().map(({ value }) => value)).toEqual(['keeper', 'photographer']);
  });

  it('gives another role', async () => {
    choose(selects()[1]!, 'identifier');
    const call = http.expectOne('/api/keep/people/i');
    expect(call.request.body).toEqual({ role: 'identifier' });
    call.flush({ ...IMRE, role: 'identifier' });
    await fixture.whenStable();
    expect(selects()[1]!.value).toBe('identifier');
  });

  it('says why the last keeper must stay, and shows the old role again', async () => {
    choose(selects()[0]!, 'editor');
    http
      .expectOne('/api/keep/people/t')
      .flush({ type: '/problems/last-keeper', title: '', status: 409 }, { status: 409, statusText: 'Conflict' });
    await fixture.whenStable();
    expect(selects()[0]!.value).toBe('keeper');
    expect(page().textContent).toContain('Somebody must stay keeper');
  });

  it('withdraws an invitation', async () => {
    page().querySelector<HTMLButtonElement>('li button')!.click();
    http.expectOne('/api/keep/invitations/inv').flush(null);
    await fixture.whenStable();
    expect(page().textContent).toContain('None is open');
  });

  it('sends one invitation, however often the button is pressed', async () => {
    const email = page().querySelector<HTMLInputElement>('form input')!;
    email.value = 'mira@x.example';
    email.dispatchEvent(new Event('input'));
    const form = page().querySelector('form')!;
    form.dispatchEvent(new Event('submit'));
    form.dispatchEvent(new Event('submit'));
    http.expectOne('/api/keep/invitations').flush({ ...OPEN, id: 'two', email: 'mira@x.example' });
    await fixture.whenStable();
    expect(page().textContent).toContain('An invitation to mira@x.example is on its way.');
  });

  it('does not send a form without an address', async () => {
    page().querySelector('form')!.dispatchEvent(new Event('submit'));
    await fixture.whenStable();
    expect(page().querySelector('mat-error')?.textContent).toContain('needed');
  });
});

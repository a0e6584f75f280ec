import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { TrayPicture } from '@shared/contracts/images';
import { MakeFind } from './make-find';

const PICTURES = [
  {
    id: 'one',
    capture: { local: '2025-11-03T10:42:00' },
    exactPlace: { latitude: 54.1, longitude: -0.5 },
    image: null,
  },
  { id: 'two', capture: { local: '2025-11-03T10:44:00' }, exactPlace: null, image: null },
] as unknown as TrayPicture[];

describe('making a find', () => {
  let fixture: ComponentFixture<MakeFind>;
  let http: HttpTestingController;
  const close = vi.fn();
  const page = () => fixture.nativeElement as HTMLElement;
  const field = (name: string) => page().querySelector<HTMLInputElement>(`[formControlName="${name}"]`)!;
  const type = (name: string, text: string) => {
    field(name).value = text;
    field(name).dispatchEvent(new Event('input'));
  };
  const submit = async () => {
    page().querySelector('form')!.dispatchEvent(new Event('submit'));
    await fixture.whenStable();
  };
  const see = (visibility: string) =>
    page().querySelector<HTMLInputElement>(`mat-radio-button input[value="${visibility}"]`)!.click();

  beforeEach(async () => {
    localStorage.clear();
    close.mockClear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        { provide: MAT_DIALOG_DATA, useValue: PICTURES },
        { provide: MatDialogRef, useValue: { close } },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(MakeFind);
    await fixture.whenStable();
  });
  afterEach(() => http.verify());

  it('reads date and exact place from the files, so that one touch makes it, private and with the place blurred', async () => {
    await submit();
    const { request } = http.expectOne('/api/finds');
    expect(request.body).toEqual({
      imageIds: ['one', 'two'],
      observation: { kind: 'in the field', observedOn: '2025-11-03', substrate: '', remarks: '' },
      place: {
        exact: { words: '', latitude: 54.1, longitude: -0.5, uncertaintyM: null },
        publicWords: '',
        sensitivity: 'medium',
      },
      visibility: 'private',
      heldUntil: null,
    });
  });

  it('asks for the date until which a find is held', async () => {
    see('held');
    await fixture.whenStable();
    await submit();
    expect(page().querySelector('.who mat-error')?.textContent).toContain('needed');
    http.expectNone('/api/finds');
  });

  it('asks for the other half of a lone degree', async () => {
    type('longitude', '');
    await submit();
    http.expectNone('/api/finds');
  });

  it('warns when the public words repeat the exact place', async () => {
    const [exact] = page().querySelectorAll<HTMLInputElement>('[formControlName="words"]');
    exact!.value = 'third sleeper from the gate';
    exact!.dispatchEvent(new Event('input'));
    type('publicWords', 'by the third sleeper, near the gate');
    await fixture.whenStable();
    expect(page().querySelector('.warning')?.textContent).toContain('repeat the exact place');
  });

  it('puts what the server says beside the field, and stays open', async () => {
    await submit();
    http.expectOne('/api/finds').flush(
      {
        type: '/problems/invalid-request',
        title: '',
        status: 422,
        errors: [{ pointer: '#/observation/substrate', code: 'too_big', detail: '' }],
      },
      { status: 422, statusText: 'Unprocessable' },
    );
    await fixture.whenStable();
    expect(field('substrate').closest('mat-form-field')?.textContent).toContain('Too long');
    expect(close).not.toHaveBeenCalled();
  });

  it('offers the next time what was said this time', async () => {
    type('substrate', 'on a fallen sleeper');
    await submit();
    http.expectOne('/api/finds').flush({ id: 'find', number: 'CW-215' });
    expect(close).toHaveBeenCalled();

    const next = TestBed.createComponent(MakeFind);
    await next.whenStable();
    const again = next.nativeElement as HTMLElement;
    expect(again.querySelector('.last')?.textContent).toContain('on a fallen sleeper');
    again.querySelector<HTMLButtonElement>('.last button')!.click();
    await next.whenStable();
    expect(again.querySelector<HTMLInputElement>('[formControlName="substrate"]')?.value).toBe('on a fallen sleeper');
  });
});

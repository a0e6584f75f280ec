import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ApplicationRef, ChangeDetectionStrategy, Component } from '@angular/core';
import { DeferBlockBehavior, TestBed } from '@angular/core/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { DeterminationView, FindPicture, FindView } from '@shared/contracts/finds';
import { SessionStore } from '../../core/session-store';
import { Find } from './find';

const id = (n: number) => `01930000-0000-7000-8000-${String(n).padStart(12, '0')}`;
const imre = { id: id(1), name: 'Imre Waddell' };
const maud = { id: id(2), name: 'Maud Okonjo-Leigh' };
const name = (text: string, qualifier = '') => ({
  name: text,
  authorship: '(Pers.) Rostaf.',
  rank: 'species',
  code: 'botanical' as const,
  qualifier,
});
const determination = (n: number, change: Partial<DeterminationView>): DeterminationView => ({
  id: id(n),
  taxonId: id(500),
  name: name('Hemitrichia clavata'),
  reason: 'spores fit',
  confidence: 'certain',
  by: maud,
  determinedAt: '2025-11-06T12:00:00.000Z',
  stands: false,
  ...change,
});
const picture = (n: number, change: Partial<FindPicture>): FindPicture => ({
  id: id(n),
  revision: 1,
  width: 1500,
  height: 1000,
  altText: `Picture ${n}`,
  colours: [],
  renditionWidths: [640],
  scale: null,
  title: '',
  role: 'subject',
  light: 'flash',
  preparationId: null,
  creditLine: 'Imre Waddell',
  licence: 'by-sa',
  ...change,
});
const stands = determination(42, { stands: true });
const guess = determination(41, {
  name: name('Trichia scabra', 'cf.'),
  reason: 'by the look of it',
  by: imre,
  confidence: 'a guess',
  determinedAt: '2025-11-03T12:00:00.000Z',
});
const find = (change: Partial<FindView> = {}): FindView => ({
  id: id(214),
  number: 'CW-214',
  owner: imre,
  visibility: 'public',
  heldUntil: null,
  fruitBodies: 3,
  publicPlace: { words: 'an old depot', latitude: 55.5, longitude: -3.2, uncertaintyM: 1280 },
  exactPlace: null,
  sensitivity: 'low',
  placeReaders: [],
  observations: [
    {
      id: id(11),
      kind: 'at the bench',
      observedOn: '2025-11-04',
      observer: maud,
      substrate: 'fallen sleeper',
      remarks: 'Spores warted.',
      preparations: [{ id: id(31), title: 'Slide 2', part: '', medium: 'water', stain: '', condition: 'fresh' }],
      pictures: [picture(21, {}), picture(22, { preparationId: id(31) }), picture(23, { role: 'reference' })],
    },
  ],
  determinations: [guess, stands],
  standing: stands,
  series: [],
  publishedSizes: [],
  may: { edit: false, determine: false, decide: false },
  ...change,
});

@Component({ template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class Elsewhere {}

describe('Find', () => {
  let http: HttpTestingController;
  let harness: RouterTestingHarness;
  const element = () => harness.routeNativeElement as HTMLElement;
  const text = (selector: string) =>
    element().querySelector(selector)?.textContent?.trim().replace(/\s+/g, ' ') ?? null;

  beforeEach(async () => {
    TestBed.configureTestingModule({
      deferBlockBehavior: DeferBlockBehavior.Playthrough,
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: 'finds/:findId', component: Find },
            { path: '**', component: Elsewhere },
          ],
          withComponentInputBinding(),
        ),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    harness = await RouterTestingHarness.create();
  });
  afterEach(() => http.verify());

  async function show(view: FindView): Promise<void> {
    await harness.navigateByUrl(`/finds/${view.id}`);
    TestBed.tick();
    http.expectOne(`/api/finds/${view.id}`).flush(view);
    await harness.fixture.whenStable();
  }

  it('is headed by the name that stands, without its authors', async () => {
    await show(find());
    expect(text('h1')).toBe('Hemitrichia clavata');
    expect(text('header p')).toBe('CW-214 · found by Imre Waddell · an old depot · fallen sleeper');
  });

  it('says that it has no name yet', async () => {
    await show(find({ standing: null, determinations: [] }));
    expect(text('h1')).toBe('Not yet named');
    expect(text('app-determination-panel')).toContain('Nobody has given it a name yet');
  });

  it('titles each observation with its day and kind, and keeps preparations apart', async () => {
    await show(find());
    expect(text('app-observation h2')).toBe('4 Nov 2025 at the bench');
    const headings = Array.from(element().querySelectorAll('app-observation h3'), (h) => h.textContent?.trim());
    expect(headings).toEqual(['Slide 2', 'Scale references']);
    const bench = Array.from(element().querySelectorAll('app-find-picture-card > a'), (a) => a.getAttribute('href'));
    expect(bench).toEqual([21, 22, 23].map((n) => `/images/${id(n)}`));
  });

  it('names every link and button, also of pictures that nobody has titled or described', async () => {
    const silent = picture(24, { altText: '', title: '' });
    const [observation] = find().observations;
    const view = find({
      observations: [{ ...(observation as FindView['observations'][number]), pictures: [picture(21, {}), silent] }],
      may: { edit: true, determine: true, decide: true },
    });
    await show(view);
    const card = element().querySelectorAll('app-find-picture-card')[1];
    expect(card?.querySelector('img')?.getAttribute('alt')).toBe('Picture 2 of CW-214');
    const labels = Array.from(card?.querySelectorAll('button') ?? [], (button) => button.getAttribute('aria-label'));
    expect(labels).toEqual(['Details of Picture 2 of CW-214', 'Carry away a copy of Picture 2 of CW-214']);
    for (const control of Array.from(element().querySelectorAll('a, button'))) {
      const alt = Array.from(control.querySelectorAll('img'), (img) => img.alt).join(' ');
      const name = (control.getAttribute('aria-label') ?? `${control.textContent} ${alt}`).trim();
      expect(name, control.outerHTML).not.toBe('');
      expect(name).not.toMatch(/\bof$|undefined|null|\{\{/);
    }
  });

  it('says of each picture whom to credit and under which licence, without asking for it', async () => {
    await show(find());
    expect(text('.caption > .words')).toBe('flash Imre Waddell, CC BY-SA 4.0');
    expect(element().querySelector('app-find-picture-card a[rel~=license]')?.getAttribute('href')).toBe(
      'http://creativecommons.org/licenses/by-sa/4.0/',
    );
    element().querySelector<HTMLElement>('app-carry-away button')?.click();
    await harness.fixture.whenStable();
    const menu = document.querySelector('.mat-mdc-menu-panel');
    expect(menu?.textContent).toContain('Imre Waddell, CC BY-SA 4.0');
    expect(menu?.querySelector('a[rel~=license]')?.textContent).toContain('What the licence allows');
  });

  it('lets the finder say what a picture shows, and shows it at once', async () => {
    await show(find({ may: { edit: true, determine: true, decide: true } }));
    element().querySelector<HTMLElement>('.caption > .words button')?.click();
    const sheet = await vi.waitUntil(() => document.querySelector<HTMLElement>('app-picture-details'));
    await TestBed.inject(ApplicationRef).whenStable(); // the form is bound to its fields
    const title = sheet.querySelector<HTMLInputElement>('input[formControlName=title]') as HTMLInputElement;
    title.value = 'Spores in water';
    title.dispatchEvent(new Event('input'));
    sheet.querySelector('form')?.dispatchEvent(new Event('submit'));
    const request = http.expectOne({ method: 'PATCH', url: `/api/images/${id(21)}` });
    expect(request.request.body).toEqual({
      title: 'Spores in water',
      altText: 'Picture 21',
      light: 'flash',
      role: 'subject',
      preparationId: null,
      licence: 'by-sa',
      creditLine: 'Imre Waddell',
    });
    // what the page takes of an answer that holds more
    request.flush({ ...picture(21, { title: 'Spores in water', light: 'bright field' }), preparation: { id: id(31) } });
    await vi.waitUntil(() => text('.caption > .words')?.startsWith('Spores in water, bright field'));
    expect(document.querySelector('app-picture-details')).toBeNull();
    expect(text('app-observation h3')).toBe('Slide 2');
    expect(element().querySelectorAll('h3 ~ app-justified app-find-picture-card')).toHaveLength(3);
    expect(document.activeElement?.getAttribute('aria-label')).toBe('Details of Spores in water');
  });

  it('tells the whole history of names, the standing one first, with reasons', async () => {
    await show(find());
    const told = Array.from(element().querySelectorAll('app-determination-panel li'), (li) => li.textContent ?? '');
    expect(told[0]).toMatch(/Hemitrichia clavata.*stands.*Maud Okonjo-Leigh, 6 Nov 2025.*certain.*spores fit/s);
    expect(told[1]).toMatch(/Trichia cf\. scabra.*Imre Waddell, 3 Nov 2025.*a guess.*by the look of it/s);
  });

  it('offers a visitor neither forms nor the exact place', async () => {
    await show(find());
    expect(element().querySelectorAll('form')).toHaveLength(0);
    expect(element().querySelector('app-visibility-panel')).toBeNull();
    expect(text('app-place-panel')).not.toContain('Exact');
    expect(text('app-determination-panel')).toContain('Sign in to give a name');
  });

  it('shows the exact place marked as such, and says why', async () => {
    TestBed.inject(SessionStore).take({
      user: {
        id: imre.id,
        email: '',
        name: imre.name,
        role: 'photographer',
        creditLine: '',
        defaultLicence: 'by',
        fingertipMm: null,
        portraitUrl: null,
      },
      demo: [],
    });
    await show(find({ exactPlace: { words: 'third sleeper', latitude: 55.51234, longitude: -3.2, uncertaintyM: 8 } }));
    expect(text('app-place-panel')).toMatch(/Exact third sleeper.*55\.51234°.*Shown to you because you found it/);
  });

  it('lets the finder say which name stands', async () => {
    await show(find({ may: { edit: false, determine: false, decide: true } }));
    element().querySelector<HTMLElement>('app-determination-panel li button')?.click();
    const request = http.expectOne({ method: 'PUT', url: `/api/finds/${id(214)}/standing/${guess.id}` });
    request.flush(find({ standing: { ...guess, stands: true } }));
    await harness.fixture.whenStable();
    expect(text('h1')).toBe('Trichia cf. scabra');
  });

  it('warns once, where a name is given, and does not send one without reason', async () => {
    await show(find({ may: { edit: false, determine: true, decide: false } }));
    element().querySelector<HTMLElement>('app-determination-panel .buttons button')?.click();
    await harness.fixture.whenStable();
    expect(document.activeElement?.closest('app-taxon-picker')).not.toBeNull();
    http.expectOne('/api/taxa').flush([]);
    expect(text('app-give-name .caution')).toContain('never says that something is safe to eat');
    element().querySelector('app-give-name form')?.dispatchEvent(new Event('submit'));
    await harness.fixture.whenStable();
    expect(text('app-give-name')).toContain('Choose a name from the list.');
    expect(text('app-give-name')).toContain('Say why, in a few words.');
  });

  it('says that there is no such find, or that it is not shown', async () => {
    await harness.navigateByUrl(`/finds/${id(9)}`);
    TestBed.tick();
    http
      .expectOne(`/api/finds/${id(9)}`)
      .flush({ type: '/problems/not-found', title: 'x', status: 404 }, { status: 404, statusText: 'x' });
    await harness.fixture.whenStable();
    expect(text('h1')).toBe('No such find');
  });
});

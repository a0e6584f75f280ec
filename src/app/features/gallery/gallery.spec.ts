import { Location } from '@angular/common';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { NavigationEnd, provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { GalleryPage, GalleryTile } from '@shared/contracts/gallery';
import { Gallery } from './gallery';

const id = (n: number) => `01930000-0000-7000-8000-${String(n).padStart(12, '0')}`;
const tile = (n: number, change: Partial<GalleryTile> = {}): GalleryTile => ({
  id: id(n),
  revision: 1,
  width: 1500,
  height: 1000,
  altText: `Picture ${n}`,
  colours: [],
  renditionWidths: [640],
  scale: { umPerPxX: 1, umPerPxY: 1, relativeUncertainty: 0.01, grounds: 'calibrated' },
  title: '',
  light: 'flash',
  findId: id(100 + n),
  findNumber: `CW-${n}`,
  taxonId: null,
  name: null,
  publicPlace: 'depot',
  creditLine: 'Imre Waddell',
  licence: 'by-sa',
  ...change,
});
const named: Partial<GalleryTile> = {
  title: 'Heads on bark',
  name: {
    name: 'Hemitrichia clavata',
    authorship: '(Pers.) Rostaf.',
    rank: 'species',
    code: 'botanical',
    qualifier: '',
  },
};
const page = (tiles: GalleryTile[], change: Partial<GalleryPage> = {}): GalleryPage => ({
  tiles,
  total: tiles.length,
  next: null,
  ...change,
});

describe('Gallery', () => {
  let http: HttpTestingController;
  let harness: RouterTestingHarness;
  const element = () => harness.routeNativeElement as HTMLElement;
  const heading = () => element().querySelector('h1')?.textContent?.trim().replace(/\s+/g, ' ');
  const tiles = () => Array.from(element().querySelectorAll('app-wall img'), (img) => img.getAttribute('alt'));

  beforeEach(async () => {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: '', component: Gallery },
            { path: 'finds/:id', children: [] },
          ],
          withComponentInputBinding(),
        ),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    harness = await RouterTestingHarness.create();
  });
  afterEach(() => http.verify());

  /** whenStable() would wait for the answer that is only now given */
  async function open(url: string): Promise<void> {
    await harness.navigateByUrl(url);
    TestBed.tick();
  }
  async function answer(body: GalleryPage): Promise<void> {
    http.expectOne((request) => request.url === '/api/gallery').flush(body);
    await harness.fixture.whenStable();
  }

  /** No picture, whereupon the list of taxa is asked for. */
  async function answerNothing(taxa: object[]): Promise<void> {
    http.expectOne((request) => request.url === '/api/gallery').flush(page([]));
    await expect.poll(() => element().textContent).toContain('No picture fits');
    http.expectOne('/api/taxa').flush(taxa);
    await harness.fixture.whenStable();
  }

  it('lets the newest picture that is fit for it lead, with credit and licence, and hangs the others on the wall', async () => {
    await open('/');
    await answer(page([tile(1), tile(2, named), tile(3, named)]));
    expect(element().querySelector('app-hero img')?.getAttribute('alt')).toBe('Picture 2');
    expect(element().querySelector('app-hero .credit')?.textContent).toMatch(/Imre Waddell,\s+CC BY-SA 4\.0/);
    expect(element().querySelector('app-hero a[rel~=license]')?.getAttribute('href')).toBe(
      'http://creativecommons.org/licenses/by-sa/4.0/',
    );
    expect(tiles()).toEqual(['Picture 1', 'Picture 3']);
  });

  it('is led by nothing where no picture is fit for it', async () => {
    await open('/');
    await answer(page([tile(1)]));
    expect(element().querySelector('app-hero')).toBeNull();
    expect(tiles()).toEqual(['Picture 1']);
  });

  it('names a picture that nobody has described after its taxon and find, its title before that', async () => {
    await open('/?q=depot');
    const silent = { altText: '', title: '' };
    await answer(page([tile(1, silent), tile(2, { ...named, ...silent }), tile(3, { ...named, altText: '' })]));
    expect(tiles()).toEqual(['Not yet named, CW-1', 'Hemitrichia clavata, CW-2', 'Heads on bark']);
  });

  it('leads from a picture to its find', async () => {
    await open('/');
    await answer(page([tile(1), tile(2)]));
    expect(element().querySelector('app-wall a')?.getAttribute('href')).toBe(`/finds/${id(101)}`);
  });

  it('asks for what the address says, shows it as chips, and takes each off by itself', async () => {
    await open(`/?q=depot&taxon=${id(7)}`);
    const request = http.expectOne((each) => each.url === '/api/gallery');
    expect([request.request.params.get('q'), request.request.params.get('taxon')]).toEqual(['depot', id(7)]);
    request.flush(page([tile(1)]));
    http
      .expectOne(`/api/taxa/${id(7)}`)
      .flush({ name: { name: 'Trichia', authorship: '', rank: 'genus', code: 'botanical', qualifier: '' } });
    await harness.fixture.whenStable();
    const chips = Array.from(element().querySelectorAll('.chip'));
    expect(chips.map((chip) => [chip.textContent?.trim(), chip.getAttribute('href')])).toEqual([
      ['Trichia', '/?q=depot'],
      ['“depot”', `/?taxon=${id(7)}`],
    ]);
    expect(element().querySelector('app-hero')).toBeNull();
    expect(tiles()).toEqual(['Picture 1']);
    expect(heading()).toBe('Pictures of Trichia with “depot”');
  });

  it('says in its heading and its title what is searched for', async () => {
    await open('/?q=depot');
    await answer(page([tile(1)]));
    expect(heading()).toBe('Pictures with “depot”');
    expect(document.title).toBe('“depot” · Motebook');
  });

  it('says how many there are, also those not fetched yet', async () => {
    await open('/');
    await answer(page([tile(1), tile(2)], { total: 1284, next: 'c1' }));
    expect(element().querySelector('.count')?.textContent).toContain('1284 pictures');
  });

  it('goes on where the last page ended', async () => {
    await open('/?q=depot');
    await answer(page([tile(1)], { total: 2, next: 'c1' }));
    element().querySelector<HTMLElement>('.more a')?.click();
    const request = http.expectOne((each) => each.url === '/api/gallery');
    expect([request.request.params.get('after'), request.request.params.get('q')]).toEqual(['c1', 'depot']);
    request.flush(page([tile(2)], { total: 2 }));
    await harness.fixture.whenStable();
    expect(tiles()).toEqual(['Picture 1', 'Picture 2']);
    expect(element().textContent).toContain('That is all.');
  });

  it('begins where the address says, without a picture hung large', async () => {
    await open('/?after=c7');
    const request = http.expectOne((each) => each.url === '/api/gallery');
    expect(request.request.params.get('after')).toBe('c7');
    request.flush(page([tile(1)]));
    await harness.fixture.whenStable();
    expect(element().querySelector('app-hero')).toBeNull();
    expect(element().querySelector('.earlier a')?.getAttribute('href')).toBe('/');
  });

  it('stands as it was when one comes back from a find, also from far down', async () => {
    TestBed.inject(Router).setUpLocationChangeListener();
    await open('/');
    await answer(page([tile(1, named), tile(2)], { total: 3, next: 'c1' }));
    element().querySelector<HTMLElement>('.more a')?.click();
    await answer(page([tile(3)], { total: 3 }));
    const location = TestBed.inject(Location);
    location.replaceState('/?after=c1', '', location.getState()); // what the wall does as one scrolls
    await harness.navigateByUrl(`/finds/${id(103)}`);
    const back = new Promise<void>((resolve) =>
      TestBed.inject(Router).events.subscribe((e) => e instanceof NavigationEnd && resolve()),
    );
    location.back();
    await back;
    await harness.fixture.whenStable();
    expect(element().querySelector('app-hero img')?.getAttribute('alt')).toBe('Picture 1');
    expect(tiles()).toEqual(['Picture 2', 'Picture 3']);
  });

  it('asks again when the search changes', async () => {
    await open('/?q=depot');
    await answer(page([tile(1)]));
    await TestBed.inject(Router).navigateByUrl('/?q=towpath');
    TestBed.tick();
    await answer(page([tile(2)]));
    expect(tiles()).toEqual(['Picture 2']);
  });

  it('says that nothing fits, and how to see all again', async () => {
    await open('/?q=unicorn');
    await answerNothing([]);
    expect(element().textContent).toContain('No picture fits');
    expect(element().querySelector('app-empty a')?.getAttribute('href')).toBe('/');
  });

  it('offers taxa with a name like the words that fit no picture', async () => {
    await open('/?q=hemitrichia clavta');
    const taxon = { rank: 'species', code: 'botanical', authorship: '', acceptedId: null };
    await answerNothing([
      { ...taxon, id: id(7), name: 'Hemitrichia clavata' },
      { ...taxon, id: id(8), name: 'Mycena pura' },
    ]);
    const names = () => element().querySelector('app-near-names a');
    await expect.poll(names).not.toBeNull();
    expect([names()?.textContent, names()?.getAttribute('href')]).toEqual(['Hemitrichia clavata', `/taxa/${id(7)}`]);
  });

  it('says what went wrong and tries again', async () => {
    await open('/');
    http.expectOne((each) => each.url === '/api/gallery').flush(null, { status: 500, statusText: 'x' });
    await harness.fixture.whenStable();
    expect(element().querySelector('app-problem')?.textContent).toContain('Something broke on our side');
    element().querySelector<HTMLElement>('app-problem button')?.click();
    TestBed.tick();
    await answer(page([tile(1), tile(2)]));
    expect(tiles()).toEqual(['Picture 1', 'Picture 2']);
  });

  it('shows empty mounts while the pictures are on their way', async () => {
    await open('/');
    expect(element().querySelector('app-wall-skeleton')).not.toBeNull();
    await answer(page([tile(1)]));
    expect(element().querySelector('app-wall-skeleton')).toBeNull();
  });
});

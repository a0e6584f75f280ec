import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component, forwardRef, input, signal } from '@angular/core';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import type { ImageView } from '@shared/contracts/images';
import { SessionStore } from '../../core/session-store';
import { Bench } from './bench';
import { BenchPicture } from './bench-picture';

const IMAGE = '01900000-0000-7000-8000-0000000000f1';
const ME = { id: '01900000-0000-7000-8000-00000000000a', name: 'Imre' };

/** Stands for the picture itself, which needs a real canvas; the browser journeys have that. */
@Component({
  selector: 'app-bench-picture',
  template: '',
  changeDetection: ChangeDetectionStrategy.OnPush,
  providers: [{ provide: BenchPicture, useExisting: forwardRef(() => NoPicture) }],
})
class NoPicture {
  readonly image = input.required<ImageView>();
  readonly panning = input(false);
  readonly spoken = signal('');
  private readonly drawing = { viewport: signal(null), drawn: signal(true), hasFocus: false, focus: () => undefined };
  readonly canvas = () => this.drawing;
  keepNudge(): void {
    // nothing is moved here
  }
}

function imageView(change: Partial<ImageView> = {}): ImageView {
  return {
    id: IMAGE,
    revision: 1,
    width: 4000,
    height: 3000,
    altText: '',
    colours: [],
    renditionWidths: [],
    scale: null,
    title: 'Spores in water',
    role: 'subject',
    light: 'bright field',
    licence: 'by',
    creditLine: 'Imre',
    owner: ME,
    bitDepth: 8,
    format: 'jpeg',
    sha256: '',
    originalName: 'spores.jpg',
    capture: { local: null, offset: null, camera: null, lens: null, focalLengthMm: null, pixelPitchUm: null },
    settingId: null,
    find: null,
    preparation: null,
    currentScale: null,
    siblings: [IMAGE],
    resolutionUm: null,
    may: { edit: true, annotate: true },
    ...change,
  };
}

describe('the bench', () => {
  let http: HttpTestingController;
  let fixture: ComponentFixture<Bench>;

  async function open(user: typeof ME | null, answer: (http: HttpTestingController) => void): Promise<HTMLElement> {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideHttpClient(),
        provideHttpClientTesting(),
        { provide: SessionStore, useValue: { user: signal(user), demo: signal([]) } },
      ],
    });
    TestBed.overrideComponent(Bench, { remove: { imports: [BenchPicture] }, add: { imports: [NoPicture] } });
    http = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(Bench);
    fixture.componentRef.setInput('imageId', IMAGE);
    TestBed.tick();
    answer(http);
    await new Promise((resolve) => setTimeout(resolve));
    TestBed.tick();
    return fixture.nativeElement as HTMLElement;
  }

  const withPicture = (change: Partial<ImageView>) => (http: HttpTestingController) => {
    http.expectOne(`/api/images/${IMAGE}`).flush(imageView(change));
    http.expectOne(`/api/images/${IMAGE}/notes`).flush({ seq: 0, notes: [], layers: [] });
    http.expectOne(`/api/images/${IMAGE}/series`).flush([]);
  };

  it('says what is missing where a picture has neither scale nor find', async () => {
    const page = await open(ME, withPicture({}));
    expect(page.textContent).toContain('No scale');
    expect(page.textContent).toContain('Measuring begins once the picture belongs to a find');
    expect(page.textContent).toContain('Point at it');
    expect(page.textContent).toContain('all kept');
  });

  it('has structures to measure once the picture belongs to a find', async () => {
    const page = await open(ME, withPicture({ find: { id: 'f', number: 'CW-214', name: null, fruitBodies: 1 } }));
    const spore = [...page.querySelectorAll('button')].find((button) => button.textContent?.includes('Spore'));
    expect(spore?.textContent).toContain('along, then across');
    expect(spore?.getAttribute('aria-pressed')).toBe('false');
    expect(page.textContent).toContain('CW-214');
  });

  it('gives a visitor everything to read and nothing to draw with', async () => {
    const page = await open(null, withPicture({ may: { edit: false, annotate: false } }));
    expect(page.textContent).toContain('Sign in');
    expect(page.textContent).not.toContain('Point at it');
    expect(page.textContent).not.toContain('Say what the scale is');
    expect(page.querySelector('[aria-label="Undo"]')).toBeNull();
  });

  it('takes the scale of a calibrated setting at one touch, and asks what was done to a smaller picture', async () => {
    const page = await open(ME, withPicture({}));
    const press = (words: string) => {
      const button = [...page.querySelectorAll('button')].find((one) => one.textContent?.includes(words));
      expect(button?.disabled).toBe(false);
      button?.click();
      TestBed.tick();
    };
    press('Say what the scale is');
    http.expectOne('/api/rigs').flush([
      {
        id: 'r',
        name: 'Kitchen microscope',
        settings: [
          { id: 's40', name: '40×', calibration: { umPerPxX: 0.25, umPerPxY: 0.25, relativeUncertainty: 0.005 } },
          { id: 's63', name: '63×', calibration: null },
        ],
      },
    ]);
    await new Promise((resolve) => setTimeout(resolve));
    TestBed.tick();
    expect(document.activeElement?.getAttribute('value')).toBe('setting');
    expect(page.querySelector('[aria-label="Kitchen microscope"] p')?.textContent).toContain('not calibrated');
    press('40×');
    const sent = http.expectOne(`/api/images/${IMAGE}/scales`);
    expect(sent.request.body).toEqual({ by: 'setting', settingId: 's40' });
    const sizes = { width: 2000, height: 1500, frameWidth: 4000, frameHeight: 3000 };
    sent.flush(
      { type: '/problems/reduced-or-cropped', title: '', status: 409, parameters: sizes },
      { status: 409, statusText: 'Conflict' },
    );
    TestBed.tick();
    expect(document.activeElement?.textContent).toContain('It was made smaller');
    press('It was cut out');
    const refused = {
      type: '/problems/invalid',
      title: '',
      status: 422,
      errors: [{ pointer: '#/sizeAnswer', code: 'larger-than-frame', detail: '' }],
    };
    http.expectOne(`/api/images/${IMAGE}/scales`).flush(refused, { status: 422, statusText: 'x' });
    TestBed.tick();
    expect(page.querySelector('app-set-scale')?.textContent).toContain('never larger than the calibrated frame');
    press('It was made smaller');
    const answered = http.expectOne(`/api/images/${IMAGE}/scales`);
    expect(answered.request.body).toEqual({ by: 'setting', settingId: 's40', sizeAnswer: 'reduced' });
    answered.flush(imageView());
    http.expectOne(`/api/images/${IMAGE}/series`).flush([]);
    await new Promise((resolve) => setTimeout(resolve));
    TestBed.tick();
    expect(page.querySelector('app-set-scale')).toBeNull();
    expect(document.activeElement?.textContent).toContain('Say what the scale is');
  });

  it('says so when the picture is not here', async () => {
    const page = await open(ME, (http) => {
      http
        .expectOne(`/api/images/${IMAGE}`)
        .flush({ type: '/problems/not-found', title: '', status: 404 }, { status: 404, statusText: 'Not Found' });
      http
        .expectOne(`/api/images/${IMAGE}/notes`)
        .flush({ type: '/problems/not-found', title: '', status: 404 }, { status: 404, statusText: 'Not Found' });
    });
    expect(page.querySelector('[role=alert]')?.textContent).toContain('not shown to you');
  });

  it('counts as settled once picture, notes and series are there and everything is kept', async () => {
    const page = await open(ME, withPicture({}));
    expect(page.hasAttribute('data-settled')).toBe(true);
  });
});

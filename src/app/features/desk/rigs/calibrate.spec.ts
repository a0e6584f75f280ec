import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component, input, model } from '@angular/core';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { By } from '@angular/platform-browser';
import { provideRouter } from '@angular/router';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Mark } from '@shared/contracts/rigs';
import { MarkPicture } from '../../../ui/viewer/mark-picture';
import { Calibrate } from './calibrate';

/** Stands for the picture that is marked: jsdom draws nothing. */
@Component({ selector: 'app-mark-picture', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
class FakeMarkPicture {
  readonly imageId = input.required<string>();
  readonly revision = input.required<number>();
  readonly width = input.required<number>();
  readonly height = input.required<number>();
  readonly spacingLabel = input<string | null>(null);
  readonly marks = model<readonly Mark[]>([]);
}

const MARKS = [
  { at: { x: 100, y: 2000 }, index: 0 },
  { at: { x: 4750, y: 2000 }, index: 100 },
];
const SETTING = { id: 'setting', rigId: 'rig', name: '40×', history: [], calibration: null };

describe('calibrating', () => {
  let fixture: ComponentFixture<Calibrate>;
  let http: HttpTestingController;
  /** with plain spaces where numbers and units stand together by no-break ones */
  const text = () => ((fixture.nativeElement as HTMLElement).textContent ?? '').replaceAll('\u00A0', ' ');
  const button = (words: string) =>
    [...(fixture.nativeElement as HTMLElement).querySelectorAll('button')].find((one) =>
      one.textContent?.includes(words),
    )!;
  const picture = () => fixture.debugElement.query(By.directive(FakeMarkPicture)).componentInstance as FakeMarkPicture;

  beforeEach(async () => {
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])],
    }).overrideComponent(Calibrate, { remove: { imports: [MarkPicture] }, add: { imports: [FakeMarkPicture] } });
    http = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(Calibrate);
    fixture.componentRef.setInput('rigId', 'rig');
    fixture.componentRef.setInput('settingId', 'setting');
    fixture.componentRef.setInput('image', 'micrometer');
    TestBed.tick();
    http.expectOne('/api/rigs/rig').flush({ id: 'rig', name: 'Kitchen microscope', settings: [SETTING] });
    http.expectOne('/api/images/micrometer').flush({ id: 'micrometer', revision: 1, width: 5000, height: 4000 });
    await fixture.whenStable();
  });
  afterEach(() => http.verify());

  it('keeps nothing before there is a fit', () => {
    expect(button('Keep').disabled).toBe(true);
    expect(text()).toContain('Mark two graduations');
  });

  it('shows the scale, its doubt and where the doubt comes from as soon as two are marked', async () => {
    picture().marks.set(MARKS);
    await fixture.whenStable();
    expect(text()).toContain('0.21505 ± 0.00038 µm/px');
    expect(text()).toContain('your marks ± 0.03 %');
    expect(text()).toContain('the micrometer ± 0.17 %');
    expect(text()).toContain('With 5 marks or more');
    expect(text()).not.toContain('longest span');
  });

  it('advises the longest span in view', async () => {
    picture().marks.set([MARKS[0]!, { at: { x: 1100, y: 2000 }, index: 20 }]);
    await fixture.whenStable();
    expect(text()).toContain('The marks span 20 % of the picture');
  });

  it('keeps it in one touch, and says how many pictures carry it', async () => {
    picture().marks.set(MARKS);
    await fixture.whenStable();
    button('Keep').click();
    const { request, flush } = bound(http.expectOne('/api/rigs/rig/settings/setting/calibrations'));
    expect(request.body).toEqual({ imageId: 'micrometer', marks: MARKS, spacingUm: 10, toleranceUm: 1.5 });
    flush({
      calibration: {
        umPerPxX: 0.2150538,
        umPerPxY: 0.2150538,
        relativeUncertainty: 0.000879,
        imageId: 'micrometer',
        validUntil: null,
      },
      scaledImages: 12,
    });
    await fixture.whenStable();
    http.expectOne('/api/tray').flush([]);
    expect(text()).toContain('12 pictures of this setting carry it now');
  });

  it('says why the server would not keep it, and leaves the marks', async () => {
    picture().marks.set(MARKS);
    await fixture.whenStable();
    button('Keep').click();
    http
      .expectOne('/api/rigs/rig/settings/setting/calibrations')
      .flush({ type: '/problems/not-ready', title: '', status: 409 }, { status: 409, statusText: 'Conflict' });
    await fixture.whenStable();
    expect(text()).toContain('still being taken in');
    expect(button('Keep').disabled).toBe(false);
  });
});

function bound(request: ReturnType<HttpTestingController['expectOne']>) {
  return { request: request.request, flush: (body: object) => request.flush(body) };
}

import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { PictureDetails, type Described } from './picture-details';

const id = (n: number) => `01930000-0000-7000-8000-${String(n).padStart(12, '0')}`;
const described = (change: Partial<Described['picture']> = {}, preparations: Described['preparations'] = []) => ({
  picture: {
    id: id(1),
    revision: 1,
    width: 1500,
    height: 1000,
    altText: '',
    colours: [],
    renditionWidths: [640],
    scale: null,
    title: '',
    role: 'subject' as const,
    light: 'flash' as const,
    preparationId: null,
    creditLine: 'Imre Waddell',
    licence: 'by-sa' as const,
    ...change,
  },
  preparations,
});

describe('PictureDetails', () => {
  const close = vi.fn();
  let http: HttpTestingController;
  let fixture: ComponentFixture<PictureDetails>;
  const element = () => fixture.nativeElement as HTMLElement;

  beforeEach(() => close.mockReset());
  afterEach(() => http.verify());

  async function open(data: Described): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        { provide: MAT_DIALOG_DATA, useValue: data },
        { provide: MatDialogRef, useValue: { close } },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(PictureDetails);
    await fixture.whenStable();
  }

  async function write(name: string, value: string): Promise<void> {
    const field = element().querySelector<HTMLInputElement>(`[formControlName=${name}]`) as HTMLInputElement;
    field.value = value;
    field.dispatchEvent(new Event('input'));
    await fixture.whenStable();
  }
  async function keep(): Promise<void> {
    element().querySelector('form')?.dispatchEvent(new Event('submit'));
    await fixture.whenStable();
  }
  /** the words beside a field */
  const wrong = (name: string) =>
    element().querySelector(`[formControlName=${name}]`)?.closest('mat-form-field')?.querySelector('mat-error')
      ?.textContent ?? null;

  it('says what good words for a picture are, and what its licence means', async () => {
    await open(described());
    expect(element().textContent).toContain('One sentence for those who cannot see it');
    expect(element().textContent).toContain('as CC BY, and what they make of it carries the same licence');
  });

  it('asks for the preparation only where there is one', async () => {
    await open(described());
    expect(element().textContent).not.toContain('Preparation');
  });

  it('offers the preparations of the observation', async () => {
    const slide = { id: id(31), title: 'Slide 2', part: '', medium: 'water', stain: '', condition: 'fresh' };
    await open(described({ preparationId: id(31) }, [slide]));
    expect(element().querySelector('[formControlName=preparationId]')?.textContent).toContain('Slide 2');
  });

  it('warns of ultraviolet lamps where that light is said', async () => {
    await open(described({ light: 'ultraviolet' }));
    expect(element().querySelector('.caution')?.textContent).toContain('never look into the lamp');
  });

  it('is not sent without a credit, and says so beside the field', async () => {
    await open(described());
    await write('creditLine', ' ');
    await keep();
    expect(wrong('creditLine')).toBe('This is not written as it should be.');
    await write('creditLine', '');
    expect(wrong('creditLine')).toBe('This is needed.');
  });

  it('is not sent with more words than are kept', async () => {
    await open(described());
    await write('title', 'x'.repeat(121));
    await write('altText', 'x'.repeat(401));
    await keep();
    expect([wrong('title'), wrong('altText')]).toEqual(['At most 120 characters.', 'At most 400 characters.']);
  });

  it('puts what the server has against it beside its field, and stays open', async () => {
    await open(described({}, [{ id: id(31), title: 'S', part: '', medium: '', stain: '', condition: 'fresh' }]));
    await keep();
    http.expectOne({ method: 'PATCH', url: `/api/images/${id(1)}` }).flush(
      {
        ...{ type: '/problems/invalid', title: 'x', status: 422 },
        errors: [{ pointer: '#/preparationId', code: 'other-observation', detail: 'x' }],
      },
      { status: 422, statusText: 'x' },
    );
    await fixture.whenStable();
    expect(wrong('preparationId')).toBe('The preparation belongs to another observation.');
    expect(close).not.toHaveBeenCalled();
  });

  it('says what else went wrong, and can be sent again', async () => {
    await open(described());
    await keep();
    http.expectOne({ method: 'PATCH', url: `/api/images/${id(1)}` }).error(new ProgressEvent('error'));
    await fixture.whenStable();
    expect(element().querySelector('app-problem')?.textContent).toContain('No answer from Motebook');
    await keep();
    http.expectOne({ method: 'PATCH', url: `/api/images/${id(1)}` }).flush({ id: id(1) });
    expect(close).toHaveBeenCalledWith({ id: id(1) });
  });
});

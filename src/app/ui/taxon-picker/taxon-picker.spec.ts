import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import type { TaxonName } from '@shared/contracts/taxa';
import { TaxonPicker } from './taxon-picker';

const taxon = (id: string, name: string, acceptedId: string | null = null): TaxonName => ({
  id,
  name,
  authorship: 'Pers.',
  rank: 'species',
  code: 'botanical',
  acceptedId,
  parentId: null,
  pictures: 0,
});
const names = [taxon('v', 'Trichia varia'), taxon('c', 'Hemitrichia clavata'), taxon('s', 'Nassula flava', 'c')];

describe('TaxonPicker', () => {
  let fixture: ComponentFixture<TaxonPicker>;
  let picked: string[];
  const field = () => (fixture.nativeElement as HTMLElement).querySelector('input') as HTMLInputElement;
  const choices = () => Array.from(document.querySelectorAll<HTMLElement>('mat-option'));
  const words = () => choices().map((choice) => choice.textContent?.replace(/\s+/g, ' ').trim());

  beforeEach(() => {
    localStorage.clear();
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    fixture = TestBed.createComponent(TaxonPicker);
    fixture.componentRef.setInput('label', 'Name');
    fixture.componentRef.setInput('keep', true);
    picked = [];
    fixture.componentInstance.picked.subscribe(({ name }) => picked.push(name));
    TestBed.tick();
    field().dispatchEvent(new Event('focus'));
    field().dispatchEvent(new Event('focusin'));
    TestBed.inject(HttpTestingController).expectOne('/api/taxa').flush(names);
  });

  async function type(text: string): Promise<void> {
    field().value = text;
    field().dispatchEvent(new Event('input'));
    // the searcher is fetched when it is first needed
    await vi.waitFor(async () => {
      await fixture.whenStable();
      expect(
        choices().length + (fixture.nativeElement as HTMLElement).querySelectorAll('.said').length,
      ).toBeGreaterThan(0);
    });
  }

  it('forgives slips of the pen', async () => {
    await type('trichea vria');
    expect(words()[0]).toContain('Trichia varia');
  });

  it('leads from a synonym to the name in use, and says so', async () => {
    await type('nassula');
    expect(words()[0]).toMatch(/Nassula flava now Hemitrichia clavata/);
    choices()[0]?.click();
    expect(picked).toEqual(['Hemitrichia clavata']);
    expect(field().value).toBe('Hemitrichia clavata');
  });

  it('begins with the names last chosen', async () => {
    await type('varia');
    choices()[0]?.click();
    field().value = '';
    field().dispatchEvent(new Event('input'));
    await fixture.whenStable();
    expect(words()[0]).toContain('Trichia varia');
    expect(words()).toHaveLength(1);
  });

  it('says that there is no such name', async () => {
    await type('zzzzzzzz');
    expect((fixture.nativeElement as HTMLElement).textContent).toContain('No name like this');
  });

  it('is marked as wrong where the form says so', async () => {
    fixture.componentRef.setInput('error', 'Choose a name.');
    await fixture.whenStable();
    const described = field().getAttribute('aria-describedby') ?? '';
    expect(field().getAttribute('aria-invalid')).toBe('true');
    expect(document.getElementById(described)?.textContent).toBe('Choose a name.');
  });
});

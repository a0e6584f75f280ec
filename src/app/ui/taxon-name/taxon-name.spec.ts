import { TestBed } from '@angular/core/testing';
import type { NameView } from '@shared/contracts/common';
import { TaxonName } from './taxon-name';

const name = (change: Partial<NameView>): NameView => ({
  name: 'Trichia varia',
  authorship: '(Pers. ex J.F. Gmel.) Pers.',
  rank: 'species',
  code: 'botanical',
  qualifier: '',
  ...change,
});

async function shown(value: NameView | null, authorship = false): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(TaxonName);
  fixture.componentRef.setInput('name', value);
  fixture.componentRef.setInput('authorship', authorship);
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}
const italics = (element: HTMLElement) => Array.from(element.querySelectorAll('i'), (i) => i.textContent);

describe('TaxonName', () => {
  it('sets genus and epithet in italics', async () => {
    expect(italics(await shown(name({})))).toEqual(['Trichia varia']);
  });

  it('keeps a qualifier roman, before the epithet that is doubted', async () => {
    const element = await shown(name({ qualifier: 'cf.' }));
    expect(element.textContent).toBe('Trichia cf. varia');
    expect(italics(element)).toEqual(['Trichia', 'varia']);
  });

  it('keeps a zoological family roman', async () => {
    expect(italics(await shown(name({ name: 'Polydesmidae', rank: 'family', code: 'zoological' })))).toEqual([]);
  });

  it('adds the authors only where they are asked for, roman', async () => {
    expect((await shown(name({}))).textContent).toBe('Trichia varia');
    const element = await shown(name({}), true);
    expect(element.textContent).toBe('Trichia varia (Pers. ex J.F. Gmel.) Pers.');
    expect(italics(element)).toEqual(['Trichia varia']);
  });

  it('says that a find has no name yet', async () => {
    expect((await shown(null)).textContent).toBe('Not yet named');
  });
});

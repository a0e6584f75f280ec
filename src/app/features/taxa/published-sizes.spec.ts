import { TestBed } from '@angular/core/testing';
import type { PublishedSizeView } from '@shared/contracts/finds';
import { PublishedSizes } from './published-sizes';

const size = (change: Partial<PublishedSizeView>): PublishedSizeView => ({
  id: 'x',
  taxonId: 't',
  taxonName: 'Trichia varia',
  structure: 'spore',
  dimension: 'length',
  minUm: 11,
  maxUm: 14,
  source: 'Macbride, Slime-Moulds',
  year: 1922,
  page: '214',
  seen: true,
  ...change,
});
async function shown(sizes: PublishedSizeView[]): Promise<string[]> {
  const fixture = TestBed.createComponent(PublishedSizes);
  fixture.componentRef.setInput('sizes', sizes);
  await fixture.whenStable();
  const rows = (fixture.nativeElement as HTMLElement).querySelectorAll('tbody tr, p');
  return Array.from(rows, (row) => row.textContent?.replace(/\s+/g, ' ').trim() ?? '');
}

describe('PublishedSizes', () => {
  it('shows a size with its book, year and page', async () => {
    const [row] = await shown([size({})]);
    expect(row).toMatch(/Spore ?along ?11–14\sµm Macbride, Slime-Moulds, 1922 214/);
    expect(row).not.toContain('from memory');
  });

  it('says what is unknown, and what was only remembered', async () => {
    const [row] = await shown([size({ year: null, page: '', seen: false })]);
    expect(row).toContain('year unknown');
    expect(row).toContain('from memory');
    expect(row).toMatch(/unknown$/);
  });

  it('says that nothing can be held against what no book gives', async () => {
    expect((await shown([]))[0]).toContain('No published size');
  });
});

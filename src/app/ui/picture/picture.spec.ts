import { TestBed } from '@angular/core/testing';
import type { ImageTile } from '@shared/contracts/images';
import { Picture, placeholder } from './picture';

const tile: ImageTile = {
  id: '01930000-0000-7000-8000-000000000001',
  revision: 3,
  width: 3000,
  height: 2000,
  altText: 'Three heads on bark',
  colours: ['#112233', '#445566', '#778899'],
  renditionWidths: [1600, 400, 800],
  scale: null,
};

async function shown(inputs: Record<string, unknown> = {}): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(Picture);
  Object.entries({ tile, ...inputs }).forEach(([name, value]) => fixture.componentRef.setInput(name, value));
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('Picture', () => {
  it('offers its renditions, smallest first, by id and revision', async () => {
    const img = (await shown()).querySelector('img');
    const url = (width: number) => `/renditions/${tile.id}~3/${width}.webp`;
    expect(img?.srcset).toBe(`${url(400)} 400w, ${url(800)} 800w, ${url(1600)} 1600w`);
    expect(img?.getAttribute('src')).toBe(url(800));
  });

  it('has its size and its alternative text before it loads', async () => {
    const element = await shown();
    const img = element.querySelector('img');
    expect([img?.getAttribute('width'), img?.getAttribute('height'), img?.alt]).toEqual([
      '3000',
      '2000',
      'Three heads on bark',
    ]);
    expect(element.style.getPropertyValue('--aspect')).toBe('1.5');
  });

  it('waits until it comes near, unless it is seen first', async () => {
    expect((await shown()).querySelector('img')?.getAttribute('loading')).toBe('lazy');
    expect((await shown({ first: true })).querySelector('img')?.getAttribute('loading')).toBe('eager');
  });

  it('carries its bar, or the words that there is none, unless told not to', async () => {
    expect((await shown()).textContent).toContain('no scale');
    expect((await shown({ bar: false })).textContent).not.toContain('no scale');
  });
});

describe('placeholder', () => {
  it('runs through the colours from left to right', () => {
    expect(placeholder(['#112233', '#445566'])).toBe('linear-gradient(90deg, #112233, #445566)');
  });

  it('takes only plain colours', () => {
    expect(placeholder(['url(//elsewhere)', '#445566'])).toBe('#445566');
    expect(placeholder([])).toBe('var(--line)');
  });
});

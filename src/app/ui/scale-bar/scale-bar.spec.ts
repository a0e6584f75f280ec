import { TestBed, type ComponentFixture } from '@angular/core/testing';
import type { ImageTile } from '@shared/contracts/images';
import { ScaleBar } from './scale-bar';

/** A picture 800 px wide at 0.5 µm/px covers 400 µm: a quarter is 100 µm, which is a bar, 200 px or 25 %. */
const scale = (grounds: 'calibrated' | 'referenced' | 'estimated'): ImageTile['scale'] => ({
  umPerPxX: 0.5,
  umPerPxY: 0.7,
  relativeUncertainty: 0.01,
  grounds,
});

describe('ScaleBar', () => {
  let fixture: ComponentFixture<ScaleBar>;
  const draw = async (value: ImageTile['scale']) => {
    fixture.componentRef.setInput('scale', value);
    fixture.componentRef.setInput('imageWidth', 800);
    await fixture.whenStable();
    return fixture.nativeElement as HTMLElement;
  };
  beforeEach(() => {
    fixture = TestBed.createComponent(ScaleBar);
  });

  it('takes its true share of the width, by the scale along x', async () => {
    const bar = (await draw(scale('calibrated'))).querySelector<HTMLElement>('.bar');
    expect(bar?.style.getPropertyValue('--length')).toBe('25');
    expect(bar?.textContent).toContain('100\u00A0µm');
  });

  it.each([
    ['calibrated', 'solid-with-ticks', 'calibrated'],
    ['referenced', 'open', 'from a reference'],
    ['estimated', 'dashed', 'estimated'],
  ] as const)('looks different and says so when its scale is %s', async (grounds, look, words) => {
    const bar = (await draw(scale(grounds))).querySelector('.bar');
    expect(bar?.classList).toContain(look);
    expect(bar?.getAttribute('aria-label')).toContain(words);
  });

  it('marks an estimate with ≈', async () => {
    expect((await draw(scale('estimated'))).textContent).toContain('≈\u00A0100\u00A0µm');
  });

  it('says that there is no scale instead of drawing a bar', async () => {
    const element = await draw(null);
    expect(element.textContent?.trim()).toBe('no scale');
    expect(element.querySelector('.line')).toBeNull();
  });
});

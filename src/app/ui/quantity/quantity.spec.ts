import { TestBed } from '@angular/core/testing';
import { Quantity } from './quantity';

async function shown(um: number, u: number, grounds: 'calibrated' | 'estimated'): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(Quantity);
  fixture.componentRef.setInput('um', um);
  fixture.componentRef.setInput('u', u);
  fixture.componentRef.setInput('grounds', grounds);
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('Quantity', () => {
  it('shows a length with its expanded uncertainty, and says that k is 2', async () => {
    // u = 0.135 is doubled to 0.27
    const element = await shown(8.44, 0.135, 'calibrated');
    expect(element.querySelector('.numbers')?.textContent).toBe('8.44\u00A0±\u00A00.27\u00A0µm');
    expect(element.textContent).toContain('k = 2');
    expect(element.querySelector('.numbers')?.getAttribute('title')).toContain('k = 2');
  });

  it('shows an estimate with ≈ and its range, never with ±', async () => {
    const text = (await shown(8000, 1000, 'estimated')).querySelector('.numbers')?.textContent;
    expect(text).toContain('≈\u00A08\u00A0mm');
    expect(text).toContain('(6–10\u00A0mm)');
    expect(text).not.toContain('±');
  });
});

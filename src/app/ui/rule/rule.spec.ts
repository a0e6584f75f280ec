import { TestBed } from '@angular/core/testing';
import { Rule } from './rule';

async function shown(progress: number | null): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(Rule);
  fixture.componentRef.setInput('progress', progress);
  fixture.componentRef.setInput('label', 'Pictures brought in');
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('Rule', () => {
  it('is an ornament that screen readers pass over', async () => {
    const rule = await shown(null);
    expect(rule.getAttribute('aria-hidden')).toBe('true');
    expect(rule.getAttribute('role')).toBeNull();
  });

  it('fills as progress and says how far and of what', async () => {
    const rule = await shown(0.42);
    expect([rule.getAttribute('role'), rule.getAttribute('aria-valuenow'), rule.getAttribute('aria-label')]).toEqual([
      'progressbar',
      '42',
      'Pictures brought in',
    ]);
    expect(rule.getAttribute('aria-hidden')).toBeNull();
    expect(rule.querySelector<HTMLElement>('.filled')?.style.width).toBe('42%');
  });

  it('never runs past its ends', async () => {
    expect((await shown(1.7)).getAttribute('aria-valuenow')).toBe('100');
    expect((await shown(-1)).getAttribute('aria-valuenow')).toBe('0');
  });
});

import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { ProblemBox } from './problem';

const answer = (status: number, code: string) =>
  new HttpErrorResponse({
    status,
    error: { type: `/problems/${code}`, title: code, status, instance: '/requests/7f3a' },
  });

async function shown(problem: unknown, retry = false) {
  const fixture = TestBed.createComponent(ProblemBox);
  fixture.componentRef.setInput('problem', problem);
  fixture.componentRef.setInput('retry', retry);
  await fixture.whenStable();
  return fixture;
}

describe('ProblemBox', () => {
  it('words a problem by its code', async () => {
    const { nativeElement } = await shown(answer(422, 'no-calibration'));
    expect(nativeElement.textContent).toContain('no calibration that holds now');
  });

  it('names the request when something broke on our side, and never the code', async () => {
    const text = (await shown(answer(500, 'unexpected'))).nativeElement.textContent;
    expect(text).toContain('7f3a');
    expect(text).not.toContain('unexpected');
  });

  it('words a code that it does not know by its status', async () => {
    const text = (await shown(answer(404, 'something-new'))).nativeElement.textContent;
    expect(text).toContain('not here, or not shown to you');
  });

  it('says that no answer came', async () => {
    const text = (await shown(new HttpErrorResponse({ status: 0 }))).nativeElement.textContent;
    expect(text).toContain('Check the connection');
  });

  it('tries again when asked to', async () => {
    const fixture = await shown(answer(500, 'unexpected'), true);
    const tries: string[] = [];
    fixture.componentInstance.again.subscribe(() => tries.push('again'));
    (fixture.nativeElement as HTMLElement).querySelector('button')?.click();
    expect(tries).toEqual(['again']);
  });
});

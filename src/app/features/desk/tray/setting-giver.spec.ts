import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { of } from 'rxjs';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { TrayPicture } from '@shared/contracts/images';
import { SettingGiver, type GivenSetting } from './setting-giver';
import type { SizeAnswer } from './size-question';

const PICTURES = ['a', 'b', 'c'].map((id) => ({ id })) as TrayPicture[];

describe('giving many pictures a setting', () => {
  let http: HttpTestingController;
  let given: GivenSetting | undefined;
  const ask = vi.fn(() => of<SizeAnswer | undefined>('reduced'));
  const scale = (id: string) => http.expectOne(`/api/images/${id}/scales`);
  const refuse = (id: string, code: string) =>
    scale(id).flush({ type: `/problems/${code}`, title: '', status: 409 }, { status: 409, statusText: 'Conflict' });

  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    http = TestBed.inject(HttpTestingController);
    given = undefined;
    ask.mockClear();
    TestBed.inject(SettingGiver)
      .give(PICTURES, 'setting', ask)
      .subscribe((result) => (given = result));
  });
  afterEach(() => http.verify());

  it('scales them all without a question where the sizes agree', () => {
    for (const { id } of PICTURES) scale(id).flush({});
    expect(given).toEqual({ scaled: 3, waiting: 0, left: 0 });
    expect(ask).not.toHaveBeenCalled();
  });

  it('asks once for all whose size is another, and sends the answer with them alone', () => {
    refuse('a', 'reduced-or-cropped');
    scale('b').flush({});
    refuse('c', 'reduced-or-cropped');
    expect(ask).toHaveBeenCalledExactlyOnceWith(2);
    for (const id of ['a', 'c']) {
      const again = scale(id);
      expect(again.request.body).toEqual({ by: 'setting', settingId: 'setting', sizeAnswer: 'reduced' });
      again.flush({});
    }
    expect(given).toEqual({ scaled: 3, waiting: 0, left: 0 });
  });

  it('leaves without a scale what nobody can answer for', () => {
    ask.mockReturnValueOnce(of(undefined));
    refuse('a', 'reduced-or-cropped');
    scale('b').flush({});
    scale('c').flush({});
    expect(given).toEqual({ scaled: 2, waiting: 0, left: 1 });
  });

  it('lets them wait for a setting that is not calibrated yet', () => {
    for (const { id } of PICTURES) refuse(id, 'no-calibration');
    for (const { id } of PICTURES) {
      const edit = http.expectOne(`/api/images/${id}`);
      expect(edit.request.body).toEqual({ settingId: 'setting' });
      edit.flush({});
    }
    expect(given).toEqual({ scaled: 0, waiting: 3, left: 0 });
  });
});

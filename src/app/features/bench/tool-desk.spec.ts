import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { BenchStore } from './bench-store';
import { NoteStore } from './note-store';
import { ToolDesk } from './tool-desk';

describe('ToolDesk', () => {
  const select = vi.fn();
  let desk: ToolDesk;

  beforeEach(() => {
    select.mockReset();
    TestBed.configureTestingModule({
      providers: [
        ToolDesk,
        { provide: NoteStore, useValue: { select } },
        { provide: BenchStore, useValue: { structure: signal(null) } },
      ],
    });
    desk = TestBed.inject(ToolDesk);
    desk.take({ does: 'measure', structure: 'spore' });
    select.mockClear();
  });

  it('lets go of the selected note when another tool is taken up', () => {
    desk.take({ does: 'measure', structure: 'thread' });
    expect(select).toHaveBeenCalledWith(null);
  });

  it('keeps it selected with the same tool, so that its ends can be put right', () => {
    desk.take({ does: 'measure', structure: 'spore' });
    expect(select).not.toHaveBeenCalled();
  });
});

import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting, type TestRequest } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import type { NoteEdit } from '@shared/annotations/note';
import { px } from '@shared/geometry/points';
import { SessionStore } from '../../core/session-store';
import { NoteStore } from './note-store';

const ME = { id: '01900000-0000-7000-8000-00000000000a', name: 'Imre' };
const IMAGE = '01900000-0000-7000-8000-0000000000f1';
const pointer = { type: 'pointer', at: px(10, 20), label: px(40, 5) } as const;

describe('the note store', () => {
  let http: HttpTestingController;
  let store: NoteStore;

  function open(): void {
    TestBed.configureTestingModule({
      providers: [
        NoteStore,
        provideHttpClient(),
        provideHttpClientTesting(),
        { provide: SessionStore, useValue: { user: () => ME } },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    store = TestBed.inject(NoteStore);
    store.open(IMAGE);
    http.expectOne(`/api/images/${IMAGE}/notes`).flush({ seq: 0, notes: [], layers: [] });
  }
  const pushes = (): TestRequest[] => http.match((request) => request.method === 'POST');
  const asks = (): TestRequest[] => http.match((request) => request.method === 'GET');
  const editsOf = (push: TestRequest) => (push.request.body as { edits: NoteEdit[] }).edits;
  const keep = (push: TestRequest, seq: number) =>
    push.flush({ seq, outcomes: editsOf(push).map(({ id }) => ({ id, outcome: 'applied' })) });
  const kept = (push: TestRequest, seq: number) => ({
    seq,
    edits: editsOf(push).map((edit) => ({ seq, author: ME, edit })),
  });
  const texts = () => store.notes().map(({ text }) => text);

  beforeEach(() => {
    localStorage.clear();
    open();
  });
  afterEach(() => localStorage.clear());

  it('shows a note at once, sends it, and is then all kept', () => {
    store.add({ kind: 'point', seriesId: null, geometry: pointer, text: 'warts' });
    expect(texts()).toEqual(['warts']);
    expect(store.kept()).toBe('keeping');
    const [push] = pushes();
    keep(push!, 1);
    asks()[0]!.flush(kept(push!, 1));
    expect(store.kept()).toBe('kept');
    expect(texts()).toEqual(['warts']);
    expect(localStorage.length).toBe(0);
  });

  it('sends edits one batch after the other, in their order', () => {
    const id = store.add({ kind: 'point', seriesId: null, geometry: pointer, text: '' });
    store.word(id, 'warts');
    store.word(id, 'warts, not a net');
    const [first, ...none] = pushes();
    expect(none).toEqual([]);
    keep(first!, 1);
    asks()[0]!.flush(kept(first!, 1));
    const [second] = pushes();
    expect(editsOf(second!).map(({ after }) => after?.text)).toEqual(['warts', 'warts, not a net']);
  });

  it('keeps what could not be sent in the browser, and sends it when the page is opened again', () => {
    store.add({ kind: 'point', seriesId: null, geometry: pointer, text: 'on the train' });
    pushes()[0]!.error(new ProgressEvent('error'));
    expect(store.kept()).toBe('offline');
    expect(texts()).toEqual(['on the train']);

    TestBed.resetTestingModule();
    open();
    expect(texts()).toEqual(['on the train']);
    expect(editsOf(pushes()[0]!)[0]?.after?.text).toBe('on the train');
  });

  it('says when the server will not have it, and lets go when told so', () => {
    store.add({ kind: 'point', seriesId: null, geometry: pointer, text: 'x' });
    pushes()[0]!.flush({ type: '/problems/forbidden', title: '', status: 403 }, { status: 403, statusText: 'no' });
    expect(store.kept()).toBe('refused');
    expect(store.problem()?.code).toBe('forbidden');
    store.letGo();
    expect(store.kept()).toBe('kept');
    expect(texts()).toEqual([]);
    expect(localStorage.length).toBe(0);
  });

  it('takes in what another writer did, and leaves it when undoing', () => {
    store.add({ kind: 'point', seriesId: null, geometry: pointer, text: 'mine' });
    const [push] = pushes();
    keep(push!, 2);
    const other = {
      ...editsOf(push!)[0]!.after!,
      id: '01900000-0000-7000-8000-0000000000b1',
      layer: 'maud',
      text: 'theirs',
    };
    asks()[0]!.flush({
      seq: 2,
      edits: [
        {
          seq: 1,
          author: { id: 'maud', name: 'Maud' },
          edit: { id: 'e', noteId: other.id, before: null, after: other },
        },
        ...kept(push!, 2).edits,
      ],
    });
    expect(texts().sort()).toEqual(['mine', 'theirs']);
    expect(store.authorOf(other)).toBe('Maud');
    store.undo();
    expect(texts()).toEqual(['theirs']);
    store.redo();
    expect(texts().sort()).toEqual(['mine', 'theirs']);
  });

  it('warns who leaves before everything is kept', () => {
    const leave = () => {
      const event = new Event('beforeunload', { cancelable: true });
      window.dispatchEvent(event);
      return event.defaultPrevented;
    };
    expect(leave()).toBe(false);
    store.add({ kind: 'point', seriesId: null, geometry: pointer, text: 'x' });
    expect(leave()).toBe(true);
  });
});
